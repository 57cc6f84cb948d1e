import { defineCase, type Resolved } from '../../case.ts'
import type { Issue } from '../../errors.ts'
import { initialTemperature, solid } from '../../statement/fields.ts'
import { quantity } from '../../statement/quantity.ts'
import { resolveSolid } from '../../statement/solid.ts'
import { fourierAtNearest, refuseAtSource } from '../../bodies/source-radii.ts'
import { solve, type PointSourceInput } from './solve.ts'

interface PointSourceResolved extends PointSourceInput, Resolved {
  radii: number[]
  times: number[]
  outputs: Resolved['outputs']
}

const fields = {
  ...solid,
  initialTemperature,
  power: quantity({
    symbol: 'P',
    unit: 'W',
    label: 'Power',
    min: -1e15,
    max: 1e15,
    hint: 'released from time 0 on; or energy',
  }).optional(),
  energy: quantity({
    symbol: 'E',
    unit: 'J',
    label: 'Energy',
    min: -1e15,
    max: 1e15,
    hint: 'released all at once at time 0; or power',
  }).optional(),
}

export default defineCase<typeof fields, PointSourceResolved>({
  id: 'point-source',
  title: 'Point source in an endless medium',
  summary: 'A body much smaller than the distances asked for releases heat in a medium without end.',
  notes:
    'For small heaters, thermistors, hot spots and buried sources seen from afar. Give power, released evenly from time 0 on, or energy, released all at once at time 0; negative where heat is drawn. Around a power the temperature settles at Tᵢ + P/(4πkr); after an energy it peaks at t = r²/(6a) and falls back. numbers.fourier is at/r² of the smallest radius. On the surface of a half space that passes no heat elsewhere, twice the power or energy gives the same answer.',
  formula: [
    'T - T_i = \\frac{P}{4\\pi k r}\\operatorname{erfc}(\\eta), \\qquad q = \\frac{P}{4\\pi r^2} \\left[\\operatorname{erfc}(\\eta) + \\frac{2\\eta}{\\pi^{1/2}}\\,e^{-\\eta^2}\\right], \\qquad \\eta = \\frac{r}{2\\,(at)^{1/2}}',
    'T - T_i = \\frac{E}{C\\,(4\\pi a t)^{3/2}}\\,e^{-\\eta^2}, \\qquad q = \\frac{k r}{2at}\\,(T - T_i)',
  ],
  sources: ['H. S. Carslaw, J. C. Jaeger, Conduction of Heat in Solids, 2nd ed. 1959, sections 10.2 and 10.4'],
  family: 'source',
  sketch: { body: 'endless', boundary: 'source' },
  fields,
  places: 'radii',
  outputs: { temperature: {}, heatFlux: { text: 'Local heat flux, positive outward from the point.' } },
  absentOutputs: {
    surfaceHeatFlux: 'A point has no surface.',
    heatGained: 'All that the point has released: energy, or power times the time.',
    meanTemperature: 'The medium has no end, so its mean stays the initial temperature.',
    remainingFraction: 'Ask the temperature: it ends at Tᵢ + P/(4πkr) around a power, and at Tᵢ again after an energy.',
    completedFraction: 'Ask the temperature: it ends at Tᵢ + P/(4πkr) around a power, and at Tᵢ again after an energy.',
    heatFraction: 'The medium has no end that it could be filled to.',
    steadyTemperature: 'It differs from place to place: Tᵢ + P/(4πkr) around a power, Tᵢ after an energy.',
    timeConstant: 'A medium without end has no time constant.',
  },
  weight: 1,
  setUp: 0,
  cautions: ['general'],
  example: {
    conductivity: 1.4,
    volumetricHeatCapacity: 2.1e6,
    initialTemperature: 15,
    power: 40,
    radii: [0.05, 0.2, 0.5],
    times: [3600, 604800],
  },
  variants: [
    {
      title: 'A burst of heat and what it leaves, all outputs',
      input: {
        conductivity: 0.6,
        diffusivity: 1.4e-7,
        initialTemperature: 20,
        energy: 5000,
        radii: [0.01, 0.03],
        times: [120, 3600],
        outputs: ['temperature', 'heatFlux'],
      },
    },
  ],
  resolve(input, refuse): PointSourceResolved {
    const body = resolveSolid(input, refuse)
    const { initialTemperature, radii = [], times, outputs } = input
    refuseAtSource(radii, refuse)
    return { ...body!, initialTemperature, ...resolveRelease(input, refuse), radii, times, outputs }
  },
  solve,
  end: ({ conductivity, initialTemperature, power }, place) =>
    power === undefined
      ? initialTemperature
      : initialTemperature + power / (4 * Math.PI * conductivity * Number(place)),
  numbers: fourierAtNearest,
  checks: () => [],
  warnings: () => [],
})

/** Exactly one of a power that lasts and an energy at once. */
function resolveRelease(
  { power, energy }: { power?: number | undefined; energy?: number | undefined },
  refuse: (issue: Issue) => void,
): { power?: number; energy?: number } {
  const accepted = 'exactly one of power (W, from time 0 on) and energy (J, at time 0)'
  if (power !== undefined && energy !== undefined) {
    const detail = 'What is released is given twice: by power and by energy.'
    refuse({ pointer: '#/energy', code: 'conflicting-fields', detail, accepted })
  }
  if (power === undefined && energy === undefined) {
    const detail = 'What the point releases is missing.'
    refuse({ pointer: '#/power', code: 'missing-field', detail, accepted })
  }
  return energy === undefined ? { power: power ?? 0 } : { energy }
}
