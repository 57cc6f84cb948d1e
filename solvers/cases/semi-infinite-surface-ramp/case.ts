import erfc from '@stdlib/math-base-special-erfc'
import { deepEnough, depthWarnings, errsIfThin, halfSpaceNumbers } from '../../bodies/deep-enough.ts'
import { heatBalance } from '../../bodies/heat-balance.ts'
import { type Check, defineCase, type Resolved } from '../../case.ts'
import { checkedThickness, initialTemperature, solid } from '../../statement/fields.ts'
import { changeHasArrived } from '../../bodies/half-space-reach.ts'
import { quantity } from '../../statement/quantity.ts'
import { resolveSolid } from '../../statement/solid.ts'
import { rampRate } from '../../statement/ramp.ts'
import { solve, type HalfSpaceInput } from './solve.ts'
import { latestOf } from '../../math/latest.ts'

type HalfSpaceResolved = HalfSpaceInput & Resolved & { thickness?: number; volumetricHeatCapacity: number }

const fields = {
  ...solid,
  thickness: checkedThickness,
  initialTemperature,
  rampRate,
  rampDuration: quantity({
    symbol: 'd',
    unit: 's',
    label: 'Ramp duration',
    min: 1e-9,
    max: 1e17,
    typical: [1, 1e8],
    hint: 'then the surface is held; left out, the ramp never ends',
  }).optional(),
}

export default defineCase<typeof fields, HalfSpaceResolved>({
  id: 'semi-infinite-surface-ramp',
  title: 'Half space, surface temperature rising evenly',
  summary: 'The surface of a body too deep for its back to be felt changes its temperature at a constant rate.',
  notes:
    'For kilns, autoclaves, cooling programmes and weather that turns: any surface whose temperature is led along a straight line. The rate may have any sign. With rampDuration the surface is held at what it has reached; long after, that is a step taken half the duration after the start. It holds while the far side has felt nothing: numbers.penetrationDepth is where 1 % of a surface step has arrived at the last time, and the body must be deeper.',
  formula: [
    'T - T_i = 4 r t\\;\\mathrm{i}^2\\operatorname{erfc}(\\eta), \\qquad q = 2 r b\\,t^{1/2} \\operatorname{ierfc}(\\eta), \\qquad Q = \\tfrac{4}{3}\\,r b\\,t\\,(t/\\pi)^{1/2}',
    '\\eta = \\frac{x}{2\\,(at)^{1/2}}, \\qquad b = (k\\rho c)^{1/2}, \\qquad 4 \\mathrm{i}^2\\operatorname{erfc}(s) = \\operatorname{erfc}(s) - 2 s \\operatorname{ierfc}(s)',
    '\\text{held after } d:\\quad T(t) - T(t - d)',
  ],
  sources: ['H. S. Carslaw, J. C. Jaeger, Conduction of Heat in Solids, 2nd ed. 1959, section 2.5'],
  family: 'half-space',
  sketch: { body: 'half-space', boundary: 'ramp' },
  fields,
  places: 'depths',
  outputs: { temperature: {}, heatFlux: {}, surfaceHeatFlux: {}, heatGained: {} },
  absentOutputs: {
    remainingFraction: 'A ramp has no end state that a share could refer to.',
    completedFraction: 'A ramp has no end state that a share could refer to.',
    meanTemperature: 'The body has no end, so its mean stays the initial temperature.',
    heatFraction: 'The heat that the body takes up in all is infinite.',
    steadyTemperature: 'The body follows its surface and settles, if that is held, only after infinite time.',
    timeConstant: 'A body without end has no time constant.',
  },
  weight: 1,
  setUp: 0,
  cautions: ['general'],
  example: {
    conductivity: 1.7,
    density: 2300,
    specificHeat: 900,
    initialTemperature: 20,
    rampRate: 0.005,
    depths: [0, 0.05, 0.15],
    times: [3600, 14400],
  },
  variants: [
    {
      title: 'A surface cooled for two hours and then held, all outputs',
      input: {
        conductivity: 0.9,
        diffusivity: 4.5e-7,
        initialTemperature: 60,
        rampRate: -0.004,
        rampDuration: 7200,
        depths: [0, 0.04],
        times: [3600, 7200, 10800, 172800],
        outputs: ['temperature', 'heatFlux', 'surfaceHeatFlux', 'heatGained'],
      },
    },
  ],
  resolve(input, refuse): HalfSpaceResolved {
    const body = resolveSolid(input, refuse)
    const { initialTemperature, rampRate, rampDuration, times, outputs } = input
    return {
      ...body!,
      ...(input.thickness === undefined ? {} : { thickness: input.thickness }),
      initialTemperature,
      rampRate,
      ...(rampDuration === undefined ? {} : { rampDuration }),
      depths: input.depths ?? [],
      times,
      outputs,
    }
  },
  solve,
  end({ rampRate, rampDuration, initialTemperature }) {
    if (rampRate !== 0 && rampDuration === undefined) return null
    return initialTemperature + rampRate * (rampDuration ?? 0)
  },
  numbers: halfSpaceNumbers,
  checks: (input) => [
    changeHasArrived(input),
    ...deepEnough(input),
    ...stepAtHalfRamp(input),
    ...heatBalance(
      solve,
      input,
      { surfaceHeatFlux: 1 },
      { instants: input.rampDuration === undefined ? [] : [input.rampDuration] },
    ),
  ],
  warnings: depthWarnings,
  errs: errsIfThin,
})

/** A ramp of a length is nearly a step in its middle: by how much they differ at the last time, as a share of the whole rise. */
function stepAtHalfRamp(input: HalfSpaceResolved): Check[] {
  const { diffusivity, depths, times, rampDuration: length, rampRate, initialTemperature } = input
  const last = latestOf(times)
  const since = length === undefined ? 0 : last - length / 2
  if (length === undefined || since <= 0 || rampRate === 0 || depths.length === 0) return []
  const { values } = solve({ ...input, times: [last], outputs: ['temperature'] }).outputs.temperature!
  const reach = 2 * Math.sqrt(diffusivity) * Math.sqrt(since)
  const value = depths.reduce((most, depth, j) => {
    const ramp = ((values as number[][])[0]![j]! - initialTemperature) / (rampRate * length)
    return Math.max(most, Math.abs(ramp - erfc(depth / reach)))
  }, 0)
  const text = 'A step in the middle of the ramp would give the last answers to 1 % of the whole rise.'
  return [{ id: 'step-at-half-ramp', holds: value <= 0.01, value, limit: 0.01, text }]
}
