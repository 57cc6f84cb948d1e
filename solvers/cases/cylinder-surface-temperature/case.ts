import { heldNumbers } from '../../bodies/held-face.ts'
import { heatBalance } from '../../bodies/heat-balance.ts'
import { defineCase } from '../../case.ts'
import { surfaceTemperature } from '../../statement/fields.ts'
import { cylinder, radialLateNumbers } from '../../bodies/radial-step.ts'
import {
  allRoundOutputs,
  fourierOf,
  insideCheck,
  type RadialResolved,
  roundAbsentOutputs,
  roundFields,
  roundOutputs,
} from '../../bodies/round-case.ts'
import { refuseFluxAtStep } from '../../bodies/singular.ts'
import { resolveSolid } from '../../statement/solid.ts'
import { solve, type CylinderInput } from './solve.ts'

type Resolved = CylinderInput & RadialResolved

const fields = { ...roundFields, surfaceTemperature }

export default defineCase<typeof fields, Resolved>({
  id: 'cylinder-surface-temperature',
  title: 'Cylinder, fixed surface temperature',
  summary: 'A long cylinder at one temperature is held at another at its surface.',
  notes:
    'For cylinders whose surface temperature is known: measured, or held by steam, ice water or a strong film; at least about four diameters long. Places are depths from the surface or radii from the axis, one of the two. Taking a fixed surface in place of a film shortens times by about 2/(Bi + 2).',
  formula: [
    '\\theta = \\frac{T - T_s}{T_i - T_s} = \\sum_n \\frac{2}{z_n J_1(z_n)} J_0\\left(z_n r/R\\right) e^{-z_n^2 \\mathrm{Fo}}, \\qquad J_0(z_n) = 0',
    '\\mathrm{Fo} = at/R^2',
  ],
  sources: ['H. S. Carslaw, J. C. Jaeger, Conduction of Heat in Solids, 2nd ed. 1959, section 7.6'],
  family: 'round',
  sketch: { body: 'cylinder', boundary: 'temperature' },
  fields,
  places: 'depths-or-radii',
  depthsEndAt: 'radius',
  dimensionless: { radius: 1 },
  drive: 'surfaceTemperature',
  outputs: roundOutputs('J/m'),
  absentOutputs: roundAbsentOutputs('surface'),
  weight: 1,
  setUp: 3,
  cautions: ['concrete', 'food', 'general'],
  example: {
    conductivity: 0.6,
    density: 1000,
    specificHeat: 4180,
    radius: 0.03,
    initialTemperature: 4,
    surfaceTemperature: 98,
    radii: [0, 0.015],
    times: [300, 1800],
  },
  variants: [
    {
      title: 'By depths, all outputs',
      input: {
        conductivity: 50,
        diffusivity: 1.4e-5,
        radius: 0.05,
        initialTemperature: 850,
        surfaceTemperature: 60,
        depths: [0, 0.02, 0.05],
        times: [5, 60],
        outputs: allRoundOutputs,
      },
    },
  ],
  resolve(input, refuse): Resolved {
    const body = resolveSolid(input, refuse)
    const { radius, initialTemperature, surfaceTemperature, depths, radii, times, outputs } = input
    const places = radii ? radii.map((r) => radius - r) : depths
    refuseFluxAtStep({ times, depths: places, outputs }, (depth) => depth === 0, refuse)
    const own = { radius, initialTemperature, surfaceTemperature }
    return { ...body!, ...own, ...(radii ? { radii } : { depths: depths ?? [] }), times, outputs }
  },
  solve,
  numbers(input) {
    const late = radialLateNumbers(cylinder, input, Infinity)
    return { fourier: fourierOf(input), length: input.radius, ...late, ...heldNumbers(input, input.radius) }
  },
  checks: (input) => [
    insideCheck(input),
    ...heatBalance(solve, input, { surfaceHeatFlux: 2 * Math.PI * input.radius }),
  ],
  warnings: () => [],
})
