import { defineCase, type Resolved } from '../../case.ts'
import { cycleEcho, resolveCycle } from '../../statement/cycle.ts'
import { cycle, film, solid } from '../../statement/fields.ts'
import { filmWarnings } from '../../statement/film.ts'
import { cycleIsFelt, periodicAbsent, periodicNumbers, periodicOutputs } from '../../bodies/periodic-half-space.ts'
import { resolveSolid } from '../../statement/solid.ts'
import { type AmbientInput, solve } from './solve.ts'

type AmbientResolved = AmbientInput & Resolved

const fields = { ...solid, ...cycle, filmCoefficient: film.filmCoefficient }

export default defineCase<typeof fields, AmbientResolved>({
  id: 'semi-infinite-periodic-ambient',
  title: 'Half space, ambient temperature in a cycle',
  summary: 'A body too deep for its back to be felt lies under air that warms and cools in a settled cycle.',
  notes:
    'For ground, roads and thick walls under the air temperature of the day or the year. The film damps the cycle and delays it before it enters; the lag of the surface behind the air is part of timeLag, which is never reduced by whole periods. The cycle has gone on long enough for its start to be forgotten, so there is no initial temperature, and times stand on the clock of timeOfMaximum or timeOfMinimum and may be negative. A film coefficient of 0 leaves the body at the mean. Snow, frost in the ground and sun are not in it.',
  formula: [
    'T = T_m + A\\,g\\,e^{-x/\\delta} \\cos\\left(\\omega (t - t_+) - \\psi - \\frac{x}{\\delta}\\right), \\qquad \\delta = \\left(\\frac{aP}{\\pi}\\right)^{1/2}, \\qquad \\omega = \\frac{2\\pi}{P}',
    'g\\,e^{-i\\psi} = \\frac{1}{1 + (1 + i)\\,k/(h\\delta)}',
    'q = \\frac{2^{1/2}\\,k A g}{\\delta}\\,e^{-x/\\delta} \\cos\\left(\\omega (t - t_+) - \\psi - \\frac{x}{\\delta} + \\frac{\\pi}{4}\\right)',
  ],
  sources: ['H. S. Carslaw, J. C. Jaeger, Conduction of Heat in Solids, 2nd ed. 1959, section 2.8'],
  family: 'half-space',
  sketch: { body: 'half-space', boundary: 'cycle' },
  fields,
  places: 'depths',
  clock: true,
  outputs: periodicOutputs,
  absentOutputs: periodicAbsent,
  weight: 5,
  setUp: 0,
  cautions: ['burial', 'general'],
  example: {
    conductivity: 1.6,
    volumetricHeatCapacity: 2.6e6,
    filmCoefficient: 14,
    cycleMean: 9,
    amplitude: 10,
    period: 31557600,
    timeOfMaximum: 17280000,
    depths: [0, 0.8, 2],
    times: [0, 8640000],
  },
  variants: [
    {
      title: 'A pavement through the day by the coldest hour, all outputs',
      input: {
        conductivity: 1.2,
        density: 2300,
        specificHeat: 920,
        filmCoefficient: 20,
        cycleMean: 18,
        amplitude: 8,
        period: 86400,
        timeOfMinimum: 14400,
        depths: [0, 0.15],
        times: [-7200, 50400],
        outputs: [
          'temperature',
          'heatFlux',
          'surfaceHeatFlux',
          'amplitude',
          'timeLag',
          'dampingDepth',
          'heatPerHalfCycle',
        ],
      },
    },
  ],
  resolve(input, refuse): AmbientResolved {
    const body = resolveSolid(input, refuse)
    const wave = resolveCycle(input, refuse)
    const { filmCoefficient, times, outputs } = input
    return { ...body!, cycle: wave!, filmCoefficient, depths: input.depths ?? [], times, outputs }
  },
  solve,
  end: () => null,
  echo: ({ cycle, ...rest }) => ({ ...rest, ...cycleEcho(cycle) }),
  numbers: periodicNumbers,
  checks: (input) => [cycleIsFelt(input)],
  warnings: (input) => filmWarnings(input.filmCoefficient),
})
