import { defineCase, type Resolved } from '../../case.ts'
import { cycleEcho, resolveCycle } from '../../statement/cycle.ts'
import { cycle, solid } from '../../statement/fields.ts'
import {
  cycleIsFelt,
  type PeriodicInput,
  periodicAbsent,
  periodicNumbers,
  periodicOutputs,
} from '../../bodies/periodic-half-space.ts'
import { resolveSolid } from '../../statement/solid.ts'
import { solve } from './solve.ts'

type PeriodicResolved = PeriodicInput & Resolved

const fields = { ...solid, ...cycle }

export default defineCase<typeof fields, PeriodicResolved>({
  id: 'semi-infinite-periodic-surface',
  title: 'Half space, surface temperature in a cycle',
  summary: 'The surface of a body too deep for its back to be felt rises and falls in a settled cycle.',
  notes:
    'For ground, dams and thick walls whose surface temperature swings with the day or the year. The cycle has gone on long enough for its start to be forgotten, so there is no initial temperature, and times stand on the clock of timeOfMaximum or timeOfMinimum and may be negative. A place follows the surface by timeLag, which is never reduced by whole periods. For a body of finite thickness this is right to 1 % from about three damping depths on.',
  formula: [
    'T = T_m + A\\,e^{-x/\\delta} \\cos\\left(\\omega (t - t_+) - \\frac{x}{\\delta}\\right), \\qquad \\delta = \\left(\\frac{aP}{\\pi}\\right)^{1/2}, \\qquad \\omega = \\frac{2\\pi}{P}',
    'q = A\\,b\\,\\omega^{1/2}\\,e^{-x/\\delta} \\cos\\left(\\omega (t - t_+) - \\frac{x}{\\delta} + \\frac{\\pi}{4}\\right), \\qquad b = (k\\rho c)^{1/2}',
    '\\text{lag } \\frac{x}{\\delta}\\,\\frac{P}{2\\pi}, \\qquad \\text{heat in half a cycle } A\\,b\\,(2P/\\pi)^{1/2}',
  ],
  sources: ['H. S. Carslaw, J. C. Jaeger, Conduction of Heat in Solids, 2nd ed. 1959, section 2.6'],
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
    cycleMean: 10,
    amplitude: 11,
    period: 31557600,
    timeOfMaximum: 17712000,
    depths: [0, 1, 3],
    times: [0, 8640000],
  },
  variants: [
    {
      title: 'A wall through the day by the coldest hour, all outputs',
      input: {
        conductivity: 0.9,
        diffusivity: 5e-7,
        cycleMean: 14,
        amplitude: 6,
        period: 86400,
        timeOfMinimum: 18000,
        depths: [0, 0.1],
        times: [-3600, 43200],
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
  resolve(input, refuse): PeriodicResolved {
    const body = resolveSolid(input, refuse)
    const wave = resolveCycle(input, refuse)
    const { times, outputs } = input
    return { ...body!, cycle: wave!, depths: input.depths ?? [], times, outputs }
  },
  solve,
  end: () => null,
  echo: ({ cycle, ...rest }) => ({ ...rest, ...cycleEcho(cycle) }),
  numbers: periodicNumbers,
  checks: (input) => [cycleIsFelt(input)],
  warnings: () => [],
})
