import { heldNumbers } from '../../bodies/held-face.ts'
import { heatBalance } from '../../bodies/heat-balance.ts'
import { defineCase, type Resolved } from '../../case.ts'
import { exposedFaces, initialTemperature, solid, surfaceTemperature, thickness } from '../../statement/fields.ts'
import { refuseFluxAtStep } from '../../bodies/singular.ts'
import { characteristicLength, slabLateNumbers } from '../../bodies/slab-step.ts'
import { resolveSolid } from '../../statement/solid.ts'
import { solve, type SlabInput } from './solve.ts'

type SlabResolved = SlabInput & Resolved

const fields = { ...solid, thickness, exposedFaces, initialTemperature, surfaceTemperature }

export default defineCase<typeof fields, SlabResolved>({
  id: 'slab-surface-temperature',
  title: 'Slab, fixed surface temperature',
  summary: 'A flat body at one temperature is held at another at one face or both.',
  notes:
    'For walls, boards and specimens whose face temperature is known: measured on the face, or held by a change of phase or a strong film. The thickness is always the whole one; exposedFaces says whether one face or both are held. With one, the far face is insulated. Taking a fixed face in place of a film shortens times by about 2/(Bi + 2).',
  formula: [
    '\\theta = \\frac{T - T_s}{T_i - T_s} = \\sum_n \\frac{2}{z_n} \\sin\\left(z_n x/L\\right) e^{-z_n^2 \\mathrm{Fo}}, \\qquad z_n = (n + \\tfrac{1}{2})\\pi',
    '\\mathrm{Fo} = at/L^2, \\qquad L = d/n',
  ],
  sources: ['H. S. Carslaw, J. C. Jaeger, Conduction of Heat in Solids, 2nd ed. 1959, sections 3.3 and 3.4'],
  family: 'slab',
  sketch: { body: 'slab', boundary: 'temperature' },
  fields,
  places: 'depths',
  depthsEndAt: 'thickness',
  dimensionless: { thickness: 1, exposedFaces: 1 },
  drive: 'surfaceTemperature',
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
    steadyTemperature: 'The body ends at the surface temperature, so there is nothing to compute.',
    timeConstant: 'The body has many time constants; only a body with one temperature has one.',
  },
  weight: 1,
  setUp: 3,
  cautions: ['envelope', 'concrete', 'general'],
  example: {
    conductivity: 1.7,
    density: 2300,
    specificHeat: 900,
    thickness: 0.2,
    exposedFaces: 2,
    initialTemperature: 20,
    surfaceTemperature: -10,
    depths: [0.02, 0.1],
    times: [1800, 14400],
  },
  variants: [
    {
      title: 'One face insulated, all outputs',
      input: {
        conductivity: 0.035,
        diffusivity: 1.2e-6,
        thickness: 0.1,
        exposedFaces: 1,
        initialTemperature: 18,
        surfaceTemperature: 40,
        depths: [0, 0.05, 0.1],
        times: [600, 7200],
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
  ],
  resolve(input, refuse): SlabResolved {
    const body = resolveSolid(input, refuse)
    const { exposedFaces, thickness, initialTemperature, surfaceTemperature, times, outputs } = input
    refuseFluxAtStep(input, (depth) => depth === 0 || (exposedFaces === 2 && depth === thickness), refuse)
    const own = { thickness, exposedFaces, initialTemperature, surfaceTemperature }
    return { ...body!, ...own, depths: input.depths ?? [], times, outputs }
  },
  solve,
  numbers(input) {
    const length = characteristicLength(input)
    const fourier = input.times.map((time) => (input.diffusivity / (length * length)) * time)
    return { fourier, length, ...slabLateNumbers(input, Infinity), ...heldNumbers(input, length) }
  },
  checks(input) {
    const deepest = input.depths.reduce((most, depth) => Math.max(most, depth), 0)
    return [
      {
        id: 'depth-inside-body',
        holds: true,
        value: deepest,
        limit: input.thickness,
        text: 'Every depth lies inside the body.',
      },
      ...heatBalance(solve, input, { surfaceHeatFlux: 1 }),
    ]
  },
  warnings: () => [],
})
