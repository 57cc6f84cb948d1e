import { type Check, defineCase, type Resolved } from '../../case.ts'
import { cycleEcho, resolveCycle } from '../../statement/cycle.ts'
import { cycle, exposedFaces, film, solid, thickness } from '../../statement/fields.ts'
import { filmWarnings } from '../../statement/film.ts'
import { faceOf } from '../../math/two-sided-body.ts'
import { twoSidedModes } from '../../math/two-sided-modes.ts'
import { resolveSolid } from '../../statement/solid.ts'
import { dampingOf, type SlabCycleInput, solve } from './solve.ts'

type SlabCycleResolved = SlabCycleInput & Resolved

const fields = {
  ...solid,
  thickness,
  exposedFaces,
  ...cycle,
  filmCoefficient: film.filmCoefficient.optional(),
}

const INITIAL = 'A settled cycle has no start: there is no initial temperature to compare with.'

/** L²/(z₁²a): how slowly the start is forgotten; absent without a film coefficient above 0. */
function slowestOf({ conductivity, diffusivity, thickness, exposedFaces, filmCoefficient }: SlabCycleInput) {
  if (filmCoefficient === 0) return undefined
  const length = thickness / exposedFaces
  const biot = ((filmCoefficient ?? Infinity) * length) / conductivity
  const z = twoSidedModes({ left: faceOf(biot), right: faceOf(0) }, 1).roots[0]!
  return (length * length) / diffusivity / (z * z)
}

/** A body thicker than three damping depths stores no more than one without end, to half a percent. */
function deepCheck(input: SlabCycleInput): Check {
  const value = input.thickness / input.exposedFaces / dampingOf(input)
  const holds = value < 3
  const text = holds
    ? 'The whole body takes part in the cycle: it is thinner, up to the insulated or middle plane, than three damping depths.'
    : 'The inside hardly takes part: from three damping depths on the body follows as one without end does, to 0.5 %.'
  return { id: 'whole-body-takes-part', holds, value, limit: 3, text }
}

export default defineCase<typeof fields, SlabCycleResolved>({
  id: 'slab-periodic',
  title: 'Slab in a settled cycle',
  summary: 'A flat body follows a temperature that rises and falls in a settled cycle, at its face or through a film.',
  notes:
    'For ceilings, floors and partitions that store heat by day and give it back by night, and for parts in a machine cycle. One face exposed (the other insulated) or both alike. Without filmCoefficient the face itself follows the cycle; with it the fluid does, and amplitude, lag, admittance and capacity are reckoned from the fluid. The cycle has gone on long enough for its start to be forgotten (numbers.cyclesToSettle), so there is no initial temperature, and times stand on the clock of timeOfMaximum or timeOfMinimum and may be negative. timeLag is never reduced by whole periods. The admittance is the amplitude of the heat flux into one exposed face per kelvin, admittanceTimeLead how far its maximum is ahead of that of the temperature, and arealHeatCapacity the period over 2π times the admittance.',
  formula: [
    'T = T_m + A\\,\\operatorname{Re}\\left[g\\,\\frac{\\cosh((1 + i)\\,(L - x)/\\delta)}{\\cosh((1 + i)\\,L/\\delta)}\\,e^{i\\omega (t - t_+)}\\right], \\qquad \\delta = \\left(\\frac{aP}{\\pi}\\right)^{1/2}, \\qquad L = \\frac{d}{n}, \\qquad \\omega = \\frac{2\\pi}{P}',
    'Y = (1 + i)\\,\\frac{k}{\\delta} \\tanh\\frac{(1 + i)\\,L}{\\delta}, \\qquad g = \\frac{1}{1 + Y/h}',
    '\\text{admittance}\\ |gY|, \\qquad \\text{time lead}\\ \\frac{P}{2\\pi} \\arg(gY), \\qquad \\text{areal heat capacity}\\ \\frac{P}{2\\pi}\\,|gY|',
  ],
  sources: ['H. S. Carslaw, J. C. Jaeger, Conduction of Heat in Solids, 2nd ed. 1959, section 3.6'],
  family: 'slab',
  sketch: { body: 'slab', boundary: 'cycle' },
  fields,
  places: 'depths',
  depthsEndAt: 'thickness',
  clock: true,
  outputs: {
    temperature: {},
    heatFlux: {},
    surfaceHeatFlux: {},
    amplitude: {},
    timeLag: {},
    admittance: {},
    admittanceTimeLead: {},
    arealHeatCapacity: {},
  },
  absentOutputs: {
    heatGained:
      'A settled cycle has no start; the heat of half a cycle is twice the arealHeatCapacity per kelvin of amplitude.',
    meanTemperature: INITIAL,
    remainingFraction: INITIAL,
    completedFraction: INITIAL,
    heatFraction: INITIAL,
    steadyTemperature: 'A settled cycle goes on for ever.',
    timeConstant: 'The body has many time constants; numbers.cyclesToSettle says how long its start is felt.',
  },
  weight: 5,
  setUp: 0,
  cautions: ['envelope', 'general'],
  example: {
    conductivity: 2.1,
    density: 2400,
    specificHeat: 1000,
    thickness: 0.22,
    exposedFaces: 2,
    filmCoefficient: 7.7,
    cycleMean: 23,
    amplitude: 4,
    period: 86_400,
    timeOfMaximum: 54_000,
    depths: [0, 0.11],
    times: [0, 43_200],
  },
  variants: [
    {
      title: 'The face itself follows, by its coldest hour, all outputs',
      input: {
        conductivity: 0.81,
        diffusivity: 4.5e-7,
        thickness: 0.24,
        exposedFaces: 1,
        cycleMean: 15,
        amplitude: 9,
        period: 86_400,
        timeOfMinimum: 18_000,
        depths: [0, 0.12, 0.24],
        times: [-3600, 36_000],
        outputs: [
          'temperature',
          'heatFlux',
          'surfaceHeatFlux',
          'amplitude',
          'timeLag',
          'admittance',
          'admittanceTimeLead',
          'arealHeatCapacity',
        ],
      },
    },
  ],
  resolve(input, refuse): SlabCycleResolved {
    const body = resolveSolid(input, refuse)
    const wave = resolveCycle(input, refuse)
    const { thickness, exposedFaces, filmCoefficient, times, outputs } = input
    return {
      ...body!,
      thickness,
      exposedFaces,
      cycle: wave!,
      ...(filmCoefficient === undefined ? {} : { filmCoefficient }),
      depths: input.depths ?? [],
      times,
      outputs,
    }
  },
  solve,
  echo: ({ cycle, ...rest }) => ({ ...rest, ...cycleEcho(cycle) }),
  numbers(input) {
    const length = input.thickness / input.exposedFaces
    const slowest = slowestOf(input)
    const { filmCoefficient } = input
    return {
      ...(filmCoefficient === undefined ? {} : { biot: (filmCoefficient * length) / input.conductivity }),
      length,
      penetrationDepth: 4.605170185988092 * dampingOf(input),
      ...(slowest === undefined
        ? {}
        : { slowestTimeConstant: slowest, cyclesToSettle: Math.ceil((4.605170186 * slowest) / input.cycle.period) }),
    }
  },
  checks: (input) => [deepCheck(input)],
  warnings: ({ filmCoefficient }) => (filmCoefficient === undefined ? [] : filmWarnings(filmCoefficient)),
})
