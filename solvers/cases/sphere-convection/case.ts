import { heatBalance } from '../../bodies/heat-balance.ts'
import { defineCase } from '../../case.ts'
import { film } from '../../statement/fields.ts'
import { filmWarnings } from '../../statement/film.ts'
import { sphere, radialLateNumbers } from '../../bodies/radial-step.ts'
import {
  allRoundOutputs,
  fourierOf,
  insideCheck,
  lumpedCheck,
  type RadialResolved,
  roundAbsentOutputs,
  roundFields,
  roundOutputs,
} from '../../bodies/round-case.ts'
import { resolveSolid } from '../../statement/solid.ts'
import { solve, type SphereInput } from './solve.ts'

type Resolved = SphereInput & RadialResolved

const biotOf = (input: Resolved) => (input.filmCoefficient * input.radius) / input.conductivity

const fields = { ...roundFields, ...film }

export default defineCase<typeof fields, Resolved>({
  id: 'sphere-convection',
  title: 'Sphere, convection at its surface',
  summary: 'A sphere at one temperature meets a fluid at another.',
  notes:
    'For fruit, balls, pellets, grains and compact pieces with about one length in all directions. Places are depths from the surface or radii from the centre, one of the two; a depth keeps its digits near the surface. A film coefficient of 0 leaves the body as it is. Properties and film are constant; a change of film in mid-history is not in this case.',
  formula: [
    '\\theta = \\frac{T - T_a}{T_i - T_a} = \\sum_n C_n \\frac{\\sin(z_n r/R)}{z_n r/R} e^{-z_n^2 \\mathrm{Fo}}',
    '1 - z_n \\cot z_n = \\mathrm{Bi}, \\qquad C_n = \\frac{4 (\\sin z_n - z_n \\cos z_n)}{2 z_n - \\sin 2 z_n}',
    '\\mathrm{Bi} = hR/k, \\qquad \\mathrm{Fo} = at/R^2',
  ],
  sources: ['H. S. Carslaw, J. C. Jaeger, Conduction of Heat in Solids, 2nd ed. 1959, section 9.4'],
  family: 'round',
  sketch: { body: 'sphere', boundary: 'convection' },
  fields,
  places: 'depths-or-radii',
  depthsEndAt: 'radius',
  dimensionless: { radius: 1 },
  drive: 'ambientTemperature',
  outputs: roundOutputs('J'),
  absentOutputs: roundAbsentOutputs('ambient'),
  weight: 1,
  setUp: 3,
  cautions: ['food', 'general'],
  example: {
    conductivity: 0.5,
    density: 1000,
    specificHeat: 3800,
    radius: 0.04,
    filmCoefficient: 25,
    initialTemperature: 25,
    ambientTemperature: 2,
    radii: [0, 0.04],
    times: [1800, 7200],
  },
  variants: [
    {
      title: 'By depths, all outputs',
      input: {
        conductivity: 45,
        volumetricHeatCapacity: 3.6e6,
        radius: 0.01,
        filmCoefficient: 800,
        initialTemperature: 850,
        ambientTemperature: 60,
        depths: [0, 0.004, 0.01],
        times: [1, 30],
        outputs: allRoundOutputs,
      },
    },
    {
      title: 'Heat and mean only: no places',
      input: {
        conductivity: 1.1,
        diffusivity: 5e-7,
        radius: 0.02,
        filmCoefficient: 90,
        initialTemperature: 20,
        ambientTemperature: 300,
        times: [60, 900],
        outputs: ['heatGained', 'meanTemperature', 'heatFraction'],
      },
    },
  ],
  resolve(input, refuse): Resolved {
    const body = resolveSolid(input, refuse)
    const { radius, filmCoefficient, initialTemperature, ambientTemperature, depths, radii, times, outputs } = input
    const own = { radius, filmCoefficient, initialTemperature, ambientTemperature }
    return { ...body!, ...own, ...(radii ? { radii } : { depths: depths ?? [] }), times, outputs }
  },
  solve,
  numbers(input) {
    const late = radialLateNumbers(sphere, input, biotOf(input))
    return { biot: biotOf(input), fourier: fourierOf(input), length: input.radius, ...late }
  },
  checks: (input) => [
    insideCheck(input),
    lumpedCheck(biotOf(input)),
    ...heatBalance(solve, input, { surfaceHeatFlux: 4 * Math.PI * input.radius * input.radius }),
  ],
  warnings: (input) => filmWarnings(input.filmCoefficient),
})
