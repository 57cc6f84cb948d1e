import { productBalance } from '../../bodies/product-balance.ts'
import { heldNumbers } from '../../bodies/held-face.ts'
import { defineCase } from '../../case.ts'
import { radius } from '../../statement/fields.ts'
import {
  absentFluxes,
  closedOutputs,
  facesAcross,
  height,
  type PointRanges,
  pointsCheck,
  productFields,
  type ProductResolved,
  rangeAcross,
  refusePoints,
  productLateNumbers,
} from '../../bodies/product-case.ts'
import { driveFields, productWarnings, resolveDrive } from '../../bodies/product-drive.ts'
import { filmIn, productEnd } from '../../bodies/product-films.ts'
import { cylinderDirection, slabDirection, reachOf } from '../../bodies/product-step.ts'
import { resolveSolid } from '../../statement/solid.ts'
import { solve, type ShortCylinderInput } from './solve.ts'

type Body = ShortCylinderInput & ProductResolved

const fields = {
  ...productFields,
  radius,
  height,
  heightFaces: facesAcross('height'),
  ...driveFields({ side: 'the round side', ends: 'the ends' }),
}

const rangesOf = (body: Pick<Body, 'radius' | 'height' | 'heightFaces'>): PointRanges => ({
  r: [0, body.radius],
  z: rangeAcross(body.height, body.heightFaces),
})

export default defineCase<typeof fields, Body>({
  id: 'short-cylinder-convection',
  title: 'Short cylinder',
  summary: 'A cylinder with ends at one temperature meets a fluid at another, or is held at another.',
  notes:
    'For cans, cores, rolls, cheeses and test cylinders. r is the radius from the axis; z runs along the height, from the mid-plane where both ends are exposed, from the insulated end where one is. All faces that are exposed meet the same fluid or are held at the same temperature, the start is uniform and nothing is generated: only then is the product of one-dimensional answers exact. The film of the ends may differ from that of the side.',
  formula: [
    '\\theta = \\theta_R(r)\\,\\theta_h(z), \\qquad 1 - \\theta = u_R + u_h - u_R u_h',
    '\\frac{Q}{Q_0} = H_R + H_h - H_R H_h, \\qquad H = 1 - \\bar\\theta',
  ],
  sources: ['H. S. Carslaw, J. C. Jaeger, Conduction of Heat in Solids, 2nd ed. 1959, section 8.4'],
  family: 'product',
  sketch: { body: 'short-cylinder', boundary: 'convection' },
  fields,
  places: 'points',
  pointAxes: ['r', 'z'],
  pointRanges: (input) => rangesOf(input as unknown as Body),
  outputs: closedOutputs('J'),
  absentOutputs: absentFluxes,
  weight: 2,
  setUp: 6,
  cautions: ['food', 'concrete', 'general'],
  example: {
    conductivity: 0.6,
    density: 1000,
    specificHeat: 4180,
    radius: 0.04,
    height: 0.11,
    heightFaces: 2,
    filmCoefficient: 120,
    initialTemperature: 4,
    ambientTemperature: 98,
    points: [
      { r: 0, z: 0 },
      { r: 0.02, z: 0.05 },
    ],
    times: [900, 3600],
  },
  variants: [
    {
      title: 'On an insulated base, films of their own, all outputs',
      input: {
        conductivity: 1.8,
        volumetricHeatCapacity: 2.2e6,
        radius: 0.075,
        height: 0.3,
        heightFaces: 1,
        filmCoefficients: { side: 9, ends: 14 },
        initialTemperature: 35,
        ambientTemperature: 15,
        points: [
          { r: 0, z: 0 },
          { r: 0.075, z: 0.3 },
        ],
        times: [3600, 36000],
        outputs: [
          'temperature',
          'heatGained',
          'meanTemperature',
          'remainingFraction',
          'completedFraction',
          'heatFraction',
        ],
      },
    },
    {
      title: 'Held surface, heat and mean only',
      input: {
        conductivity: 50,
        diffusivity: 1.3e-5,
        radius: 0.03,
        height: 0.05,
        heightFaces: 2,
        surfaceTemperature: 60,
        initialTemperature: 850,
        times: [2, 20],
        outputs: ['heatGained', 'meanTemperature', 'heatFraction'],
      },
    },
  ],
  resolve(input, refuse): Body {
    const solid = resolveSolid(input, refuse)
    const { initialTemperature, times, outputs, radius, height, heightFaces } = input
    const own = { radius, height, heightFaces }
    const points = input.points ?? []
    refusePoints(points, rangesOf(own), refuse)
    return { ...solid!, ...own, initialTemperature, ...resolveDrive(input, refuse), points, times, outputs }
  },
  solve,
  end: productEnd,
  numbers: (input) => ({
    ...productLateNumbers([
      cylinderDirection(input, input.radius, filmIn(input, 'side')),
      slabDirection(input, { size: input.height, faces: input.heightFaces }, 'z', filmIn(input, 'ends')),
    ]),
    ...heldNumbers(input, Math.min(input.radius, reachOf({ size: input.height, faces: input.heightFaces }))),
  }),
  checks: (input) => [
    pointsCheck(input, Math.max(input.radius, input.height)),
    ...productBalance(solve, input, Math.PI * input.radius * input.radius * input.height, [
      { shape: 'cylinder', reach: input.radius, film: filmIn(input, 'side') },
      { shape: 'slab', reach: reachOf({ size: input.height, faces: input.heightFaces }), film: filmIn(input, 'ends') },
    ]),
  ],
  warnings: productWarnings,
})
