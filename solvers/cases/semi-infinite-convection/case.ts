import { deepEnough, depthWarnings, errsIfThin, halfSpaceNumbers } from '../../bodies/deep-enough.ts'
import { contentBalance, heatBalance } from '../../bodies/heat-balance.ts'
import { type Check, defineCase, type Resolved } from '../../case.ts'
import type { Issue } from '../../errors.ts'
import { checkedThickness, film, imposedHeatFlux, initialTemperature, solid } from '../../statement/fields.ts'
import { filmWarnings } from '../../statement/film.ts'
import { changeHasArrived } from '../../bodies/half-space-reach.ts'
import type { OutputName } from '../../outputs.ts'
import { resolveSolid } from '../../statement/solid.ts'
import { solve, type HalfSpaceInput } from './solve.ts'

type HalfSpaceResolved = HalfSpaceInput & Resolved & { thickness?: number; volumetricHeatCapacity: number }

const fields = {
  ...solid,
  thickness: checkedThickness,
  initialTemperature,
  ...film,
  imposedHeatFlux: imposedHeatFlux.optional(),
}

export default defineCase<typeof fields, HalfSpaceResolved>({
  id: 'semi-infinite-convection',
  title: 'Half space, convection at the surface',
  summary: 'A body too deep for its back to be felt meets a fluid at another temperature.',
  notes:
    'For ground, thick walls and the first minutes or hours of any body. It holds while the far side has felt nothing: numbers.penetrationDepth is where 1 % of a surface step has arrived at the last time, and the body must be deeper. A film coefficient of 0 leaves the body as it is. Sun, radiation or friction absorbed at the surface is imposedHeatFlux: the body then heads for ambientTemperature + imposedHeatFlux/filmCoefficient, which the fractions refer to.',
  formula: [
    '\\frac{T - T_i}{T_a - T_i} = e^{-\\eta^2} \\left[\\operatorname{erfcx}(\\eta) - \\operatorname{erfcx}(\\eta + \\beta)\\right]',
    '\\eta = \\frac{x}{2\\,(at)^{1/2}}, \\qquad \\beta = \\frac{h\\,(at)^{1/2}}{k}, \\qquad \\operatorname{erfcx}(s) = e^{s^2} \\operatorname{erfc}(s)',
    'q = h\\,(T_a - T_i)\\,e^{-\\eta^2} \\operatorname{erfcx}(\\eta + \\beta), \\qquad \\text{with a flux } q_0 \\text{ absorbed: } T_a + q_0/h \\text{ for } T_a',
  ],
  sources: ['H. S. Carslaw, J. C. Jaeger, Conduction of Heat in Solids, 2nd ed. 1959, section 2.7'],
  family: 'half-space',
  sketch: { body: 'half-space', boundary: 'convection' },
  fields,
  places: 'depths',
  drive: 'ambientTemperature',
  outputs: {
    temperature: {},
    heatFlux: {},
    surfaceHeatFlux: {},
    heatGained: {},
    remainingFraction: {},
    completedFraction: {},
  },
  absentOutputs: {
    meanTemperature: 'The body has no end, so its mean stays the initial temperature.',
    heatFraction: 'The heat that the body takes up in all is infinite.',
    steadyTemperature:
      'The body ends at the ambient temperature, or imposedHeatFlux/filmCoefficient above it, after infinite time.',
    timeConstant: 'A body without end has no time constant.',
  },
  weight: 1,
  setUp: 0,
  cautions: ['envelope', 'general'],
  example: {
    conductivity: 1.5,
    density: 1500,
    specificHeat: 2085,
    filmCoefficient: 25,
    initialTemperature: 9,
    ambientTemperature: -12,
    depths: [0, 0.5, 1],
    times: [86400, 864000],
  },
  variants: [
    {
      title: 'Heat drawn from the ground, by its diffusivity',
      input: {
        conductivity: 2,
        diffusivity: 1e-6,
        filmCoefficient: 12,
        initialTemperature: 10,
        ambientTemperature: -5,
        depths: [0, 0.3],
        times: [3600, 86400],
        outputs: ['temperature', 'heatFlux', 'surfaceHeatFlux', 'heatGained', 'remainingFraction', 'completedFraction'],
      },
    },
    {
      title: 'A dark wall in the sun, all outputs',
      input: {
        conductivity: 1.4,
        density: 2200,
        specificHeat: 920,
        filmCoefficient: 18,
        imposedHeatFlux: 550,
        initialTemperature: 16,
        ambientTemperature: 24,
        depths: [0, 0.1],
        times: [1800, 14400],
        outputs: ['temperature', 'heatFlux', 'surfaceHeatFlux', 'heatGained', 'remainingFraction', 'completedFraction'],
      },
    },
  ],
  resolve(input, refuse): HalfSpaceResolved {
    const body = resolveSolid(input, refuse)
    const { filmCoefficient, imposedHeatFlux, initialTemperature, ambientTemperature, times, outputs } = input
    if (filmCoefficient === 0 && imposedHeatFlux) refuseFractions(outputs, refuse)
    return {
      ...body!,
      ...(input.thickness === undefined ? {} : { thickness: input.thickness }),
      filmCoefficient,
      ...(imposedHeatFlux === undefined ? {} : { imposedHeatFlux }),
      initialTemperature,
      ambientTemperature,
      depths: input.depths ?? [],
      times,
      outputs,
    }
  },
  solve,
  end({ filmCoefficient: h, imposedHeatFlux: flux = 0, ambientTemperature, initialTemperature }) {
    if (h === 0) return flux === 0 ? initialTemperature : null
    return ambientTemperature + flux / h
  },
  numbers: halfSpaceNumbers,
  checks: (input) => [changeHasArrived(input), ...deepEnough(input), ...balance(input)],
  warnings: (input) => [...depthWarnings(input), ...filmWarnings(input.filmCoefficient)],
  errs: errsIfThin,
})

/** Without a film the flux is given, and its heat says nothing of the temperatures. */
function balance(input: HalfSpaceResolved): Check[] {
  if (input.filmCoefficient > 0) return heatBalance(solve, input, { surfaceHeatFlux: 1 })
  return contentBalance(solve, input, {
    diffusivity: input.diffusivity,
    capacityAt: () => input.volumetricHeatCapacity,
    places: (depths) => ({ depths }),
  })
}

/** Without a film a flux heats for ever: there is no end state, and no share of it. */
function refuseFractions(outputs: readonly OutputName[], refuse: (issue: Issue) => void): void {
  outputs.forEach((name, i) => {
    if (name !== 'remainingFraction' && name !== 'completedFraction') return
    const detail = `"${name}": with a film coefficient of 0 a flux heats the body without end.`
    const accepted = 'temperature, heatFlux, surfaceHeatFlux, heatGained'
    refuse({ pointer: `#/outputs/${i}`, code: 'output-not-defined', detail, accepted })
  })
}
