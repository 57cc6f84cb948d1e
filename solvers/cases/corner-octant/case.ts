import { heldHalfSpaceNumbers } from '../../bodies/held-face.ts'
import { defineCase } from '../../case.ts'
import {
  absentHeat,
  ENDLESS,
  pointsCheck,
  productFields,
  productOutputs,
  type ProductResolved,
  refusePoints,
} from '../../bodies/product-case.ts'
import { driveFields, productWarnings, resolveDrive } from '../../bodies/product-drive.ts'
import { productEnd } from '../../bodies/product-films.ts'
import { resolveSolid } from '../../statement/solid.ts'
import { solve } from './solve.ts'

type Body = ProductResolved

const fields = {
  ...productFields,
  ...driveFields({ x: 'the face at x = 0', y: 'the face at y = 0', z: 'the face at z = 0' }),
}

const rangesOf = () => ({ x: ENDLESS, y: ENDLESS, z: ENDLESS })

export default defineCase<typeof fields, Body>({
  id: 'corner-octant',
  title: 'Corner of a thick body',
  summary:
    'Three faces that meet at right angles, of a body too thick for its backs to be felt, meet a fluid or are held at a temperature.',
  notes:
    'For the corners of walls, slabs and blocks at early times, which change first. x, y, z are the distances from the faces. It holds until the change has reached the backs: half spaces with one face say when. All faces that are exposed meet the same fluid or are held at the same temperature, the start is uniform and nothing is generated: only then is the product of one-dimensional answers exact.',
  formula: [
    '\\theta = \\theta_\\infty(x)\\,\\theta_\\infty(y)\\,\\theta_\\infty(z), \\qquad \\theta_\\infty(x) = \\operatorname{erf}(\\eta) + e^{-\\eta^2} \\operatorname{erfcx}(\\eta + \\beta)',
    '\\eta = \\frac{x}{2\\,(at)^{1/2}}, \\qquad \\beta = \\frac{h\\,(at)^{1/2}}{k}',
  ],
  sources: ['H. S. Carslaw, J. C. Jaeger, Conduction of Heat in Solids, 2nd ed. 1959, section 6.2'],
  family: 'product',
  sketch: { body: 'corner', boundary: 'convection' },
  fields,
  places: 'points',
  pointAxes: ['x', 'y', 'z'],
  pointRanges: rangesOf,
  outputs: productOutputs,
  absentOutputs: absentHeat,
  weight: 3,
  setUp: 0,
  cautions: ['concrete', 'general'],
  example: {
    conductivity: 1.7,
    density: 2300,
    specificHeat: 900,
    filmCoefficient: 20,
    initialTemperature: 15,
    ambientTemperature: -10,
    points: [
      { x: 0.05, y: 0.1, z: 0.02 },
      { x: 0, y: 0, z: 0 },
    ],
    times: [3600, 14400],
  },
  variants: [
    {
      title: 'Films of their own, all outputs',
      input: {
        conductivity: 2.3,
        volumetricHeatCapacity: 2.2e6,
        filmCoefficients: { x: 25, y: 8, z: 12 },
        initialTemperature: 30,
        ambientTemperature: 5,
        points: [{ x: 0.02, y: 0.02, z: 0.03 }],
        times: [1800, 36000],
        outputs: ['temperature', 'remainingFraction', 'completedFraction'],
      },
    },
    {
      title: 'Held surface',
      input: {
        conductivity: 0.8,
        diffusivity: 5e-7,
        surfaceTemperature: 400,
        initialTemperature: 20,
        points: [
          { x: 0.01, y: 0.03, z: 0.05 },
          { x: 0.2, y: 0.2, z: 0.2 },
        ],
        times: [60, 1800],
      },
    },
  ],
  resolve(input, refuse): Body {
    const solid = resolveSolid(input, refuse)
    const { initialTemperature, times, outputs } = input
    const points = input.points ?? []
    refusePoints(points, rangesOf(), refuse)
    return { ...solid!, initialTemperature, ...resolveDrive(input, refuse), points, times, outputs }
  },
  solve,
  end: productEnd,
  numbers: (input) => (input.surfaceTemperature === undefined ? {} : heldHalfSpaceNumbers(input)),
  checks: (input) => [pointsCheck(input, 1e5)],
  warnings: productWarnings,
})
