import { heldHalfSpaceNumbers } from '../../bodies/held-face.ts'
import { deepEnough, depthWarnings, errsIfThin, halfSpaceNumbers } from '../../bodies/deep-enough.ts'
import { heatBalance } from '../../bodies/heat-balance.ts'
import { defineCase, type Resolved } from '../../case.ts'
import { checkedThickness, initialTemperature, solid, surfaceTemperature } from '../../statement/fields.ts'
import { changeHasArrived } from '../../bodies/half-space-reach.ts'
import { refuseFluxAtStep } from '../../bodies/singular.ts'
import { resolveSolid } from '../../statement/solid.ts'
import { solve, type HalfSpaceInput } from './solve.ts'

type HalfSpaceResolved = HalfSpaceInput & Resolved & { thickness?: number; volumetricHeatCapacity: number }

const fields = { ...solid, thickness: checkedThickness, initialTemperature, surfaceTemperature }

export default defineCase<typeof fields, HalfSpaceResolved>({
  id: 'semi-infinite-surface-temperature',
  title: 'Half space, fixed surface temperature',
  summary: 'A body too deep for its back to be felt is held at another temperature at its surface.',
  notes:
    'For ground, thick concrete and the first minutes of any body whose face temperature is known: measured on the face, or held by a change of phase or a strong film. It holds while the far side has felt nothing: numbers.penetrationDepth is where 1 % of the change has arrived at the last time, and the body must be deeper. Taking a fixed face in place of a film shortens times by about 2/(Bi + 2).',
  formula: [
    '\\frac{T - T_s}{T_i - T_s} = \\operatorname{erf}(\\eta), \\qquad \\eta = \\frac{x}{2\\,(at)^{1/2}}',
    'q = \\frac{b\\,(T_s - T_i)}{(\\pi t)^{1/2}}\\; e^{-\\eta^2}, \\qquad Q = 2 b\\,(T_s - T_i)\\,(t/\\pi)^{1/2}',
    'b = (k\\rho c)^{1/2}',
  ],
  sources: ['H. S. Carslaw, J. C. Jaeger, Conduction of Heat in Solids, 2nd ed. 1959, section 2.4'],
  family: 'half-space',
  sketch: { body: 'half-space', boundary: 'temperature' },
  fields,
  places: 'depths',
  drive: 'surfaceTemperature',
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
    steadyTemperature: 'The body ends at the surface temperature, after infinite time.',
    timeConstant: 'A body without end has no time constant.',
  },
  weight: 1,
  setUp: 0,
  cautions: ['burial', 'general'],
  example: {
    conductivity: 1.5,
    diffusivity: 6.25e-7,
    initialTemperature: 9,
    surfaceTemperature: -12,
    depths: [0.5, 1, 1.75],
    times: [86400, 3888000],
  },
  variants: [
    {
      title: 'A concrete face at once at another temperature, all outputs',
      input: {
        conductivity: 1.7,
        density: 2300,
        specificHeat: 900,
        initialTemperature: 20,
        surfaceTemperature: -10,
        depths: [0, 0.02],
        times: [600, 86400],
        outputs: ['temperature', 'heatFlux', 'surfaceHeatFlux', 'heatGained', 'remainingFraction', 'completedFraction'],
      },
    },
  ],
  resolve(input, refuse): HalfSpaceResolved {
    const body = resolveSolid(input, refuse)
    refuseFluxAtStep(input, (depth) => depth === 0, refuse)
    const { initialTemperature, surfaceTemperature, times, outputs } = input
    const checked = input.thickness === undefined ? {} : { thickness: input.thickness }
    return { ...body!, ...checked, initialTemperature, surfaceTemperature, depths: input.depths ?? [], times, outputs }
  },
  solve,
  numbers: (input) => ({ ...halfSpaceNumbers(input), ...heldHalfSpaceNumbers(input) }),
  checks: (input) => [
    changeHasArrived(input),
    ...deepEnough(input),
    ...heatBalance(solve, input, { surfaceHeatFlux: 1 }),
  ],
  warnings: depthWarnings,
  errs: errsIfThin,
})
