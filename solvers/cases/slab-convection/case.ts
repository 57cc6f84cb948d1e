import { heatBalance } from '../../bodies/heat-balance.ts'
import { defineCase, type Resolved } from '../../case.ts'
import { exposedFaces, film, initialTemperature, solid, thickness } from '../../statement/fields.ts'
import { filmWarnings } from '../../statement/film.ts'
import { resolveSolid } from '../../statement/solid.ts'
import { characteristicLength, slabLateNumbers } from '../../bodies/slab-step.ts'
import { solve, type SlabInput } from './solve.ts'

type SlabResolved = SlabInput & Resolved

const biotOf = (input: SlabResolved) => (input.filmCoefficient * characteristicLength(input)) / input.conductivity

const fields = { ...solid, thickness, exposedFaces, initialTemperature, ...film }

export default defineCase<typeof fields, SlabResolved>({
  id: 'slab-convection',
  title: 'Slab, convection at one face or both',
  summary: 'A flat body at one temperature meets a fluid at another.',
  notes:
    'For walls, floors, boards and panels whose width is at least four times the distance the heat travels. The thickness is always the whole one; exposedFaces says whether one face or both meet the fluid. With one, the far face is insulated. A film coefficient of 0 leaves the body as it is. Properties and film are constant; a change of film in mid-history is two solves.',
  formula: [
    '\\theta = \\frac{T - T_a}{T_i - T_a} = \\sum_n C_n\\, e^{-z_n^2 \\mathrm{Fo}} \\cos\\left(z_n (1 - x/L)\\right)',
    'z_n \\tan z_n = \\mathrm{Bi}, \\qquad C_n = \\frac{4 \\sin z_n}{2 z_n + \\sin 2 z_n}',
    '\\mathrm{Bi} = hL/k, \\qquad \\mathrm{Fo} = at/L^2, \\qquad L = d/n',
  ],
  sources: ['H. S. Carslaw, J. C. Jaeger, Conduction of Heat in Solids, 2nd ed. 1959, section 3.11'],
  family: 'slab',
  sketch: { body: 'slab', boundary: 'convection' },
  fields,
  places: 'depths',
  depthsEndAt: 'thickness',
  dimensionless: { thickness: 1, exposedFaces: 1 },
  drive: 'ambientTemperature',
  outputs: {
    temperature: {},
    heatFlux: {},
    surfaceHeatFlux: {},
    heatGained: {},
    meanTemperature: {},
    remainingFraction: {},
    completedFraction: {},
    heatFraction: {},
  },
  absentOutputs: {
    steadyTemperature: 'The body ends at the ambient temperature, so there is nothing to compute.',
    timeConstant: 'The body has many time constants; only a body with one temperature has one.',
  },
  weight: 1,
  setUp: 3,
  cautions: ['envelope', 'concrete', 'general'],
  example: {
    conductivity: 2,
    density: 2400,
    specificHeat: 1000,
    thickness: 0.2,
    exposedFaces: 2,
    filmCoefficient: 10,
    initialTemperature: 20,
    ambientTemperature: -5,
    depths: [0, 0.1],
    times: [3600, 36000],
  },
  variants: [
    {
      title: 'One face insulated, all outputs',
      input: {
        conductivity: 0.81,
        diffusivity: 4.5e-7,
        thickness: 0.36,
        exposedFaces: 1,
        filmCoefficient: 25,
        initialTemperature: 20,
        ambientTemperature: -10,
        depths: [0, 0.12, 0.36],
        times: [3600, 86400],
        outputs: [
          'temperature',
          'heatFlux',
          'surfaceHeatFlux',
          'heatGained',
          'meanTemperature',
          'remainingFraction',
          'completedFraction',
          'heatFraction',
        ],
      },
    },
    {
      title: 'A volumetric heat capacity, heat and mean only: no depths',
      input: {
        conductivity: 2,
        volumetricHeatCapacity: 2.4e6,
        thickness: 1,
        exposedFaces: 2,
        filmCoefficient: 7.7,
        initialTemperature: 30,
        ambientTemperature: 10,
        times: [86400],
        outputs: ['heatGained', 'meanTemperature', 'heatFraction'],
      },
    },
  ],
  resolve(input, refuse): SlabResolved {
    const body = resolveSolid(input, refuse)
    const { exposedFaces, thickness, filmCoefficient, initialTemperature, ambientTemperature, times, outputs } = input
    const own = { thickness, exposedFaces, filmCoefficient, initialTemperature, ambientTemperature }
    return { ...body!, ...own, depths: input.depths ?? [], times, outputs }
  },
  solve,
  numbers(input) {
    const length = characteristicLength(input)
    const fourier = input.times.map((time) => (input.diffusivity / (length * length)) * time)
    const biot = biotOf(input)
    return { biot, fourier, length, ...slabLateNumbers(input, biot) }
  },
  checks(input) {
    const deepest = input.depths.reduce((most, depth) => Math.max(most, depth), 0)
    const biot = biotOf(input)
    return [
      {
        id: 'depth-inside-body',
        holds: true,
        value: deepest,
        limit: input.thickness,
        text: 'Every depth lies inside the body.',
      },
      {
        id: 'one-temperature-would-not-do',
        holds: biot > 0.1,
        value: biot,
        limit: 0.1,
        text:
          biot > 0.1
            ? 'The temperature differs across the body (Biot number above 0.1), so this case is needed.'
            : 'The Biot number is at most 0.1: one temperature would do here, and lumped-convection gives it.',
      },
      ...heatBalance(solve, input, { surfaceHeatFlux: 1 }),
    ]
  },
  warnings: (input) => filmWarnings(input.filmCoefficient),
})
