import { deepEnough, depthWarnings, errsIfThin, halfSpaceNumbers } from '../../bodies/deep-enough.ts'
import { contentBalance } from '../../bodies/heat-balance.ts'
import { defineCase, type Resolved } from '../../case.ts'
import { checkedThickness, imposedHeatFlux, initialTemperature, solid } from '../../statement/fields.ts'
import { changeHasArrived } from '../../bodies/half-space-reach.ts'
import { quantity } from '../../statement/quantity.ts'
import { resolveSolid } from '../../statement/solid.ts'
import { solve, type HalfSpaceInput } from './solve.ts'

type HalfSpaceResolved = HalfSpaceInput & Resolved & { thickness?: number; volumetricHeatCapacity: number }

const fields = {
  ...solid,
  thickness: checkedThickness,
  initialTemperature,
  imposedHeatFlux,
  pulseDuration: quantity({
    symbol: 'd',
    unit: 's',
    label: 'Pulse duration',
    min: 1e-9,
    max: 1e17,
    typical: [1e-3, 1e8],
    hint: 'the flux acts as long, then the face is insulated; left out, it never ends',
  }).optional(),
}

export default defineCase<typeof fields, HalfSpaceResolved>({
  id: 'semi-infinite-surface-flux',
  title: 'Half space, constant heat flux',
  summary: 'A body too deep for its back to be felt takes up a constant heat flux at its surface.',
  notes:
    'For sun on a wall, heating foils, friction, lasers and welding far from the edge. The temperature rises as the root of time and has no end; with pulseDuration the flux acts for that long, then the surface is insulated and the heat spreads until the body is back at its initial temperature. At the end of the pulse itself the flux still acts. A flux that a film carries away again is the case with convection and imposedHeatFlux. It holds while the far side has felt nothing: numbers.penetrationDepth is where 1 % of a surface step has arrived at the last time, and the body must be deeper.',
  formula: [
    'T - T_i = \\frac{2 q_0\\,t^{1/2}}{b}\\,\\operatorname{ierfc}(\\eta), \\qquad q = q_0 \\operatorname{erfc}(\\eta), \\qquad Q = q_0 t',
    '\\eta = \\frac{x}{2\\,(at)^{1/2}}, \\qquad b = (k\\rho c)^{1/2}, \\qquad \\operatorname{ierfc}(s) = \\frac{e^{-s^2}}{\\pi^{1/2}} - s \\operatorname{erfc}(s)',
    '\\text{after a pulse of duration } d:\\quad T(t) - T(t - d)',
  ],
  sources: ['H. S. Carslaw, J. C. Jaeger, Conduction of Heat in Solids, 2nd ed. 1959, section 2.9'],
  family: 'half-space',
  sketch: { body: 'half-space', boundary: 'flux' },
  fields,
  places: 'depths',
  outputs: { temperature: {}, heatFlux: {}, surfaceHeatFlux: {}, heatGained: {} },
  absentOutputs: {
    remainingFraction: 'A constant flux has no end state that a share could refer to.',
    completedFraction: 'A constant flux has no end state that a share could refer to.',
    meanTemperature: 'The body has no end, so its mean stays the initial temperature.',
    heatFraction: 'A constant flux has no end state that a share could refer to.',
    steadyTemperature: 'The temperature rises as the root of time; after a pulse it falls back to the initial one.',
    timeConstant: 'A body without end has no time constant.',
  },
  weight: 1,
  setUp: 0,
  cautions: ['general'],
  example: {
    conductivity: 2,
    density: 2300,
    specificHeat: 900,
    initialTemperature: 15,
    imposedHeatFlux: 600,
    depths: [0, 0.05, 0.2],
    times: [3600, 21600],
  },
  variants: [
    {
      title: 'A pulse of an hour and what it leaves, all outputs',
      input: {
        conductivity: 0.8,
        volumetricHeatCapacity: 1.5e6,
        initialTemperature: 20,
        imposedHeatFlux: 1500,
        pulseDuration: 3600,
        depths: [0, 0.03],
        times: [1800, 3600, 7200, 86400],
        outputs: ['temperature', 'heatFlux', 'surfaceHeatFlux', 'heatGained'],
      },
    },
    {
      title: 'Heat drawn from the ground, by its diffusivity',
      input: {
        conductivity: 2,
        diffusivity: 9e-7,
        initialTemperature: 11,
        imposedHeatFlux: -40,
        depths: [0, 0.5],
        times: [86400],
      },
    },
  ],
  resolve(input, refuse): HalfSpaceResolved {
    const body = resolveSolid(input, refuse)
    const { initialTemperature, imposedHeatFlux, pulseDuration, times, outputs } = input
    return {
      ...body!,
      ...(input.thickness === undefined ? {} : { thickness: input.thickness }),
      initialTemperature,
      imposedHeatFlux,
      ...(pulseDuration === undefined ? {} : { pulseDuration }),
      depths: input.depths ?? [],
      times,
      outputs,
    }
  },
  solve,
  end: ({ imposedHeatFlux, pulseDuration, initialTemperature }) =>
    imposedHeatFlux === 0 || pulseDuration !== undefined ? initialTemperature : null,
  numbers: halfSpaceNumbers,
  checks: (input) => [
    changeHasArrived(input),
    ...deepEnough(input),
    ...contentBalance(solve, input, {
      diffusivity: input.diffusivity,
      capacityAt: () => input.volumetricHeatCapacity,
      places: (depths) => ({ depths }),
    }),
  ],
  warnings: depthWarnings,
  errs: errsIfThin,
})
