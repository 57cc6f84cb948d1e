import { contentBalance, heatBalance } from '../../bodies/heat-balance.ts'
import { z } from 'zod'
import { type Check, defineCase, type Resolved } from '../../case.ts'
import type { Issue } from '../../errors.ts'
import { initialTemperature, radius, solid } from '../../statement/fields.ts'
import { filmWarnings } from '../../statement/film.ts'
import type { OutputName } from '../../outputs.ts'
import { quantity } from '../../statement/quantity.ts'
import { filmOf, fluxOf, temperatureOf } from '../../statement/side.ts'
import { sideField } from '../../statement/side-field.ts'
import { resolveSolid } from '../../statement/solid.ts'
import type { Warning } from '../../warnings.ts'
import { type MediumBoundary, type MediumInput, solve } from './solve.ts'
import { latestOf } from '../../math/latest.ts'

type MediumResolved = MediumInput & Resolved & { length?: number }

const linePower = quantity({
  symbol: 'P',
  unit: 'W/m',
  label: 'Line power',
  min: -1e15,
  max: 1e15,
  typical: [-100, 100],
  hint: 'released per metre from time 0 on; negative where heat is drawn',
})
const powered = z.strictObject({ kind: z.literal('line-power'), linePower }).meta({
  title: 'Power',
  'x-hint': 'released evenly along the cylinder, per metre',
})

const fields = {
  ...solid,
  radius,
  boundary: z.discriminatedUnion('kind', [...sideField('Boundary').options, powered]).meta({
    title: 'Boundary',
    description:
      'Boundary: a side of kind temperature, convection, flux, insulated or line-power, with the figures of its kind.',
    'x-hint': 'held, in a fluid, heated by a flux or a power, or insulated',
  }),
  length: quantity({
    symbol: 'H',
    unit: 'm',
    label: 'Length of the cylinder',
    min: 1e-9,
    max: 1e5,
    typical: [0.1, 300],
    hint: 'to check when its ends are felt; changes no number',
    changesNoNumber: true,
  }).optional(),
  initialTemperature,
}

const ALL: OutputName[] = [
  'temperature',
  'heatFlux',
  'surfaceHeatFlux',
  'heatGained',
  'remainingFraction',
  'completedFraction',
]

export default defineCase<typeof fields, MediumResolved>({
  id: 'cylinder-in-infinite-medium',
  title: 'Endless medium around a cylinder',
  summary: 'A long hole, pipe, pile or borehole heats or cools the medium around it.',
  notes:
    'For boreholes, energy piles, buried pipes, mine galleries and probes of finite thickness, in ground or rock that has no end. The cylinder itself is not part of the body: heat enters the medium at its surface, and radii are measured from its axis outward from there. Where a flux or a power enters, the temperature grows with the logarithm of time and has no end; where the surface is held or meets a fluid, the medium ends at that temperature, slowly. Heat is told per metre of cylinder. With length, a warning tells when the ends of the cylinder are felt: after length²/(90a) the middle is about 1 % off.',
  formula: [
    '\\mathcal{L}\\{T - T_i\\} = \\frac{g\\,K_0(r p)}{s\\left[\\alpha k p\\,K_1(R p) + \\eta K_0(R p)\\right]}, \\qquad p = (s/a)^{1/2}',
    '\\text{held: } \\alpha = 0,\\ \\eta = 1,\\ g = T_s - T_i; \\qquad \\text{film: } \\alpha = 1,\\ \\eta = h,\\ g = h(T_a - T_i) + q_0',
    '\\text{flux or power: } \\alpha = 1,\\ \\eta = 0,\\ g = q_0 = P/(2\\pi R)',
  ],
  sources: [
    'H. S. Carslaw, J. C. Jaeger, Conduction of Heat in Solids, 2nd ed. 1959, section 13.5',
    'J. A. C. Weideman, L. N. Trefethen, Mathematics of Computation 76 (2007), for the inversion',
  ],
  family: 'round',
  sketch: { body: 'hole', boundary: 'flux' },
  fields,
  places: 'radii',
  radiiBeginAt: 'radius',
  outputs: {
    temperature: {},
    heatFlux: { text: 'Local heat flux, positive outward from the cylinder.' },
    surfaceHeatFlux: { text: 'Heat flux conducted into the medium at the surface of the cylinder, per m2 of it.' },
    heatGained: { unit: 'J/m' },
    remainingFraction: {},
    completedFraction: {},
  },
  absentOutputs: {
    meanTemperature: 'The medium has no end, so its mean stays the initial temperature.',
    heatFraction: 'The heat that the medium takes up in all is infinite.',
    steadyTemperature:
      'The medium comes to the temperature of its surface only after infinite time, and under a flux it has no end state.',
    timeConstant: 'A medium without end has no time constant.',
  },
  weight: 20,
  setUp: 0,
  cautions: ['burial', 'general'],
  example: {
    conductivity: 2.1,
    volumetricHeatCapacity: 2.3e6,
    radius: 0.075,
    boundary: { kind: 'line-power', linePower: 42 },
    length: 110,
    initialTemperature: 11,
    radii: [0.075, 0.5, 3],
    times: [86400, 2592000, 31557600],
  },
  variants: [
    {
      title: 'A gallery ventilated with cool air, all outputs',
      input: {
        conductivity: 3.2,
        density: 2700,
        specificHeat: 840,
        radius: 2.4,
        boundary: { kind: 'convection', ambientTemperature: 17, filmCoefficient: 6 },
        initialTemperature: 38,
        radii: [2.4, 4, 9],
        times: [86400, 31557600],
        outputs: ALL,
      },
    },
    {
      title: 'A pipe held at its water temperature',
      input: {
        conductivity: 1.5,
        diffusivity: 6e-7,
        radius: 0.16,
        boundary: { kind: 'temperature', surfaceTemperature: 70 },
        initialTemperature: 10,
        radii: [0.3, 1],
        times: [3600, 864000],
        outputs: ALL,
      },
    },
    {
      title: 'A flux into the medium',
      input: {
        conductivity: 1.5,
        diffusivity: 6e-7,
        radius: 0.02,
        boundary: { kind: 'flux', imposedHeatFlux: 120 },
        initialTemperature: 10,
        radii: [0.02, 0.1],
        times: [0, 3600],
        outputs: ['temperature', 'heatFlux', 'surfaceHeatFlux', 'heatGained'],
      },
    },
    {
      title: 'A fluid and the sun at once',
      input: {
        conductivity: 0.9,
        diffusivity: 5e-7,
        radius: 1,
        boundary: { kind: 'convection', ambientTemperature: 20, filmCoefficient: 9, imposedHeatFlux: 60 },
        initialTemperature: 12,
        radii: [1, 1.5],
        times: [0, 7200],
        outputs: ALL,
      },
    },
    {
      title: 'Nothing passes',
      input: {
        conductivity: 0.9,
        diffusivity: 5e-7,
        radius: 1,
        boundary: { kind: 'insulated' },
        initialTemperature: 12,
        radii: [1, 1.5],
        times: [7200],
        outputs: ['temperature', 'heatFlux', 'surfaceHeatFlux', 'heatGained'],
      },
    },
  ],
  resolve(input, refuse): MediumResolved {
    const body = resolveSolid(input, refuse)
    const { radius, boundary, length, initialTemperature, radii = [], times, outputs } = input
    refuseFractions(boundary, outputs, refuse)
    refuseSingular(boundary, { radius, radii, times, outputs }, refuse)
    const checked = length === undefined ? {} : { length }
    return { ...body!, radius, boundary, ...checked, initialTemperature, radii, times, outputs }
  },
  solve,
  end({ boundary, initialTemperature }) {
    if (boundary.kind === 'line-power') return boundary.linePower === 0 ? initialTemperature : null
    const end = temperatureOf(boundary)
    if (end === undefined) return fluxOf(boundary) === 0 ? initialTemperature : null
    const film = filmOf(boundary)
    return film === Infinity ? end : end + fluxOf(boundary) / film
  },
  numbers(input) {
    const { radius, conductivity, diffusivity, times, boundary } = input
    const fourier = times.map((time) => ((Math.sqrt(diffusivity) * Math.sqrt(time)) / radius) ** 2)
    const film = boundary.kind === 'convection' ? { biot: (boundary.filmCoefficient * radius) / conductivity } : {}
    const until = input.length === undefined ? {} : { validUntil: endsFeltAfter(input) }
    return { ...film, fourier, length: radius, ...until }
  },
  checks: (input) => [...endsNotFelt(input), ...balance(input)],
  // Heat that passes beyond the ends is missing at the middle.
  errs: ({ length }) => (length === undefined ? undefined : 'early'),
  warnings: (input) => [
    ...endWarnings(input),
    ...(input.boundary.kind === 'convection' ? filmWarnings(input.boundary.filmCoefficient) : []),
  ],
})

/** Without a film and a temperature there is no end state, and no share of it. */
function refuseFractions(
  boundary: MediumBoundary,
  outputs: readonly OutputName[],
  refuse: (issue: Issue) => void,
): void {
  if (boundary.kind !== 'line-power' && temperatureOf(boundary) !== undefined) return
  outputs.forEach((name, i) => {
    if (name !== 'remainingFraction' && name !== 'completedFraction') return
    const detail = `"${name}": under a flux alone the medium has no end state.`
    const accepted = 'temperature, heatFlux, surfaceHeatFlux, heatGained'
    refuse({ pointer: `#/outputs/${i}`, code: 'output-not-defined', detail, accepted })
  })
}

function refuseSingular(
  boundary: MediumBoundary,
  { radius, radii, times, outputs }: Pick<MediumInput, 'radius' | 'radii' | 'times' | 'outputs'>,
  refuse: (issue: Issue) => void,
): void {
  const local = outputs.includes('heatFlux') && radii.includes(radius)
  if (boundary.kind !== 'temperature' || !(local || outputs.includes('surfaceHeatFlux'))) return
  times.forEach((time, i) => {
    if (time !== 0) return
    const detail = 'The heat flux at a face that is stepped in temperature is infinite at time 0.'
    refuse({ pointer: `#/times/${i}`, code: 'singular-at-time-zero', detail, accepted: 'a time above 0 s' })
  })
}

/** The time from which the middle of a cylinder of this length is 1 % off. */
const endsFeltAfter = ({ length, diffusivity }: MediumResolved) =>
  length === undefined ? Infinity : (length / 90 / diffusivity) * length

function endsNotFelt(input: MediumResolved): Check[] {
  if (input.length === undefined) return []
  const value = latestOf(input.times)
  const limit = endsFeltAfter(input)
  const text = 'The last time is before length²/(90a), when the ends of the cylinder are felt at its middle by 1 %.'
  return [{ id: 'ends-not-felt', holds: value <= limit, value, limit, text }]
}

function endWarnings(input: MediumResolved): Warning[] {
  const value = endsFeltAfter(input)
  if (latestOf(input.times) <= value) return []
  const text = `After ${value.toPrecision(3)} s the ends of the cylinder are felt at its middle: heat leaves beyond them too, and the change is overstated.`
  return [{ code: 'end-effects', text, value }]
}

/** Where the flux is given, its heat says nothing of the temperatures: what they hold is summed around the cylinder. */
function balance(input: MediumResolved): Check[] {
  const { boundary, radius, diffusivity, volumetricHeatCapacity } = input
  const brought = boundary.kind === 'temperature' || (boundary.kind === 'convection' && boundary.filmCoefficient > 0)
  if (brought) return heatBalance(solve, input, { surfaceHeatFlux: 2 * Math.PI * radius })
  return contentBalance(solve, input, {
    diffusivity,
    capacityAt: (depth) => 2 * Math.PI * (radius + depth) * volumetricHeatCapacity,
    places: (depths) => ({ radii: depths.map((depth) => radius + depth) }),
  })
}
