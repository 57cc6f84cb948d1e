import { type Check, defineCase, type Resolved } from '../../case.ts'
import { initialTemperature, solid } from '../../statement/fields.ts'
import { quantity } from '../../statement/quantity.ts'
import { resolveSolid } from '../../statement/solid.ts'
import { fourierAtNearest, lateForLogarithm, logarithmFrom, refuseAtSource } from '../../bodies/source-radii.ts'
import { solve, type LineSourceInput } from './solve.ts'

interface LineSourceResolved extends LineSourceInput, Resolved {
  probeRadius?: number
  radii: number[]
  times: number[]
  outputs: Resolved['outputs']
}

const fields = {
  ...solid,
  initialTemperature,
  linePower: quantity({
    symbol: 'P',
    unit: 'W/m',
    label: 'Line power',
    min: -1e15,
    max: 1e15,
    typical: [-100, 100],
    hint: 'released per metre from time 0 on; negative where heat is drawn',
  }),
  probeRadius: quantity({
    symbol: 'R',
    unit: 'm',
    label: 'Probe radius',
    min: 1e-9,
    max: 1e5,
    typical: [2e-4, 0.2],
    hint: 'to check how well a line stands for the probe; changes no number',
    changesNoNumber: true,
  }).optional(),
}

export default defineCase<typeof fields, LineSourceResolved>({
  id: 'line-source',
  title: 'Line source in an endless medium',
  summary: 'A thin straight wire or pipe releases heat evenly in a medium without end.',
  notes:
    'For needle probes, buried cables and boreholes seen from afar. The line has no thickness: with probeRadius the answer checks that the probe is thin for the times asked (a probe of finite radius differs by 9.4 % at Fo 5, 2.6 % at 20, 1.1 % at 50). The temperature grows as the logarithm of time and has no end. numbers.fourier is at/r² of the smallest radius, and a quarter of the 4at/r² that tells when a straight line over ln t will do.',
  formula: [
    'T - T_i = \\frac{P}{4\\pi k}\\,E_1(u), \\qquad q = \\frac{P}{2\\pi r}\\,e^{-u}, \\qquad u = \\frac{r^2}{4at}',
    'E_1(u) = \\int_u^\\infty \\frac{e^{-s}}{s}\\,ds \\approx \\ln\\frac{4at}{r^2} - 0.5772 \\quad \\text{late}',
  ],
  sources: ['H. S. Carslaw, J. C. Jaeger, Conduction of Heat in Solids, 2nd ed. 1959, section 10.4'],
  family: 'source',
  sketch: { body: 'endless', boundary: 'source' },
  fields,
  places: 'radii',
  outputs: { temperature: {}, heatFlux: { text: 'Local heat flux, positive outward from the line.' } },
  absentOutputs: {
    surfaceHeatFlux: 'A line has no surface; it releases linePower per metre.',
    heatGained: 'All that the line has released: linePower times the time.',
    meanTemperature: 'The medium has no end, so its mean stays the initial temperature.',
    remainingFraction: 'The temperature grows as the logarithm of time and has no end state.',
    completedFraction: 'The temperature grows as the logarithm of time and has no end state.',
    heatFraction: 'The temperature grows as the logarithm of time and has no end state.',
    steadyTemperature: 'The temperature grows as the logarithm of time and has no end state.',
    timeConstant: 'A medium without end has no time constant.',
  },
  weight: 1,
  setUp: 0,
  cautions: ['general'],
  example: {
    conductivity: 1.6,
    volumetricHeatCapacity: 2.4e6,
    initialTemperature: 12,
    linePower: 35,
    radii: [0.05, 0.5, 2],
    times: [86400, 2592000],
  },
  variants: [
    {
      title: 'A needle probe in wet clay, all outputs',
      input: {
        conductivity: 1.3,
        diffusivity: 5e-7,
        initialTemperature: 20,
        linePower: 8,
        probeRadius: 0.0012,
        radii: [0.0012, 0.01],
        times: [30, 300],
        outputs: ['temperature', 'heatFlux'],
      },
    },
  ],
  resolve(input, refuse): LineSourceResolved {
    const body = resolveSolid(input, refuse)
    const { initialTemperature, linePower, probeRadius, radii = [], times, outputs } = input
    refuseAtSource(radii, refuse)
    const probe = probeRadius === undefined ? {} : { probeRadius }
    return { ...body!, initialTemperature, linePower, ...probe, radii, times, outputs }
  },
  solve,
  end: ({ linePower, initialTemperature }) => (linePower === 0 ? initialTemperature : null),
  numbers: (input) => ({ ...fourierAtNearest(input), ...logarithmFrom(input) }),
  checks: (input) => [...lateForLogarithm(input), ...probeChecks(input)],
  warnings: () => [],
  // A probe gives off its whole power at its face at once, a line only once the heat has come as far.
  errs: ({ probeRadius }) => (probeRadius === undefined ? undefined : 'late'),
})

function probeChecks({ probeRadius, diffusivity, radii, times }: LineSourceResolved): Check[] {
  if (probeRadius === undefined) return []
  const nearest = radii.reduce((least, r) => Math.min(least, r), Infinity)
  const outside: Check = {
    id: 'outside-the-probe',
    holds: nearest >= probeRadius,
    value: nearest,
    limit: probeRadius,
    text: 'Every radius lies outside the probe.',
  }
  const earliest = times.reduce((least, t) => (t > 0 ? Math.min(least, t) : least), Infinity)
  if (earliest === Infinity) return [outside]
  const value = ((Math.sqrt(diffusivity) * Math.sqrt(earliest)) / probeRadius) ** 2
  const text = 'At the first time at/R² of the probe is at least 50, so that a line stands for it to about 1 %.'
  return [outside, { id: 'probe-is-thin', holds: value >= 50, value, limit: 50, text }]
}
