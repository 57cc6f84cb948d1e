import { productBalance } from '../../bodies/product-balance.ts'
import { heldNumbers } from '../../bodies/held-face.ts'
import { defineCase } from '../../case.ts'
import {
  absentFluxes,
  closedOutputs,
  facesAcross,
  height,
  length,
  type PointRanges,
  pointsCheck,
  productFields,
  type ProductResolved,
  rangeAcross,
  refusePoints,
  productLateNumbers,
  width,
} from '../../bodies/product-case.ts'
import { driveFields, productWarnings, resolveDrive } from '../../bodies/product-drive.ts'
import { filmIn, productEnd } from '../../bodies/product-films.ts'
import { slabDirection, reachOf } from '../../bodies/product-step.ts'
import { resolveSolid } from '../../statement/solid.ts'
import { solve, type BrickInput } from './solve.ts'

type Body = BrickInput & ProductResolved
type Sizes = Pick<Body, 'width' | 'height' | 'length' | 'widthFaces' | 'heightFaces' | 'lengthFaces'>

const fields = {
  ...productFields,
  width,
  height,
  length,
  widthFaces: facesAcross('width'),
  heightFaces: facesAcross('height'),
  lengthFaces: facesAcross('length'),
  ...driveFields({
    width: 'the faces across the width',
    height: 'the faces across the height',
    length: 'the faces across the length',
  }),
}

const rangesOf = (body: Sizes): PointRanges => ({
  x: rangeAcross(body.width, body.widthFaces),
  y: rangeAcross(body.height, body.heightFaces),
  z: rangeAcross(body.length, body.lengthFaces),
})

export default defineCase<typeof fields, Body>({
  id: 'brick-rectangular',
  title: 'Rectangular brick',
  summary: 'A rectangular block at one temperature meets a fluid at another, or is held at another.',
  notes:
    'For bricks, blocks, crates, pallets and test cubes. x runs along the width, y along the height, z along the length, each from the mid-plane where both faces are exposed, from the insulated face where one is. All faces that are exposed meet the same fluid or are held at the same temperature, the start is uniform and nothing is generated: only then is the product of one-dimensional answers exact. A film may differ from one direction to the other.',
  formula: [
    '\\theta = \\theta_w(x)\\,\\theta_h(y)\\,\\theta_l(z), \\qquad 1 - \\theta = u_w + u_h (1 - u_w) + u_l (1 - u_w)(1 - u_h)',
    '\\frac{Q}{Q_0} = 1 - \\bar\\theta_w\\,\\bar\\theta_h\\,\\bar\\theta_l',
  ],
  sources: ['H. S. Carslaw, J. C. Jaeger, Conduction of Heat in Solids, 2nd ed. 1959, section 6.2'],
  family: 'product',
  sketch: { body: 'brick', boundary: 'convection' },
  fields,
  places: 'points',
  pointAxes: ['x', 'y', 'z'],
  pointRanges: (input) => rangesOf(input as unknown as Body),
  outputs: closedOutputs('J'),
  absentOutputs: absentFluxes,
  weight: 3,
  setUp: 9,
  cautions: ['concrete', 'food', 'general'],
  example: {
    conductivity: 0.77,
    density: 1750,
    specificHeat: 920,
    width: 0.115,
    height: 0.07,
    length: 0.24,
    widthFaces: 2,
    heightFaces: 2,
    lengthFaces: 2,
    filmCoefficient: 30,
    initialTemperature: 900,
    ambientTemperature: 20,
    points: [
      { x: 0, y: 0, z: 0 },
      { x: 0.0575, y: 0.035, z: 0.12 },
    ],
    times: [1800, 7200],
  },
  variants: [
    {
      title: 'On an insulated floor, films of their own, all outputs',
      input: {
        conductivity: 0.5,
        volumetricHeatCapacity: 3.6e6,
        width: 0.8,
        height: 0.5,
        length: 1.2,
        widthFaces: 2,
        heightFaces: 1,
        lengthFaces: 2,
        filmCoefficients: { width: 12, height: 6, length: 12 },
        initialTemperature: 20,
        ambientTemperature: 2,
        points: [
          { x: 0, y: 0, z: 0 },
          { x: -0.2, y: 0.4, z: 0.3 },
        ],
        times: [36000, 864000],
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
        conductivity: 1.9,
        diffusivity: 8e-7,
        width: 0.15,
        height: 0.15,
        length: 0.15,
        widthFaces: 2,
        heightFaces: 2,
        lengthFaces: 2,
        surfaceTemperature: 20,
        initialTemperature: 5,
        times: [600, 7200],
        outputs: ['heatGained', 'meanTemperature', 'heatFraction'],
      },
    },
  ],
  resolve(input, refuse): Body {
    const solid = resolveSolid(input, refuse)
    const { initialTemperature, times, outputs, width, height, length, widthFaces, heightFaces, lengthFaces } = input
    const own = { width, height, length, widthFaces, heightFaces, lengthFaces }
    const points = input.points ?? []
    refusePoints(points, rangesOf(own), refuse)
    return { ...solid!, ...own, initialTemperature, ...resolveDrive(input, refuse), points, times, outputs }
  },
  solve,
  end: productEnd,
  numbers: (input) => ({
    ...productLateNumbers([
      slabDirection(input, { size: input.width, faces: input.widthFaces }, 'x', filmIn(input, 'width')),
      slabDirection(input, { size: input.height, faces: input.heightFaces }, 'y', filmIn(input, 'height')),
      slabDirection(input, { size: input.length, faces: input.lengthFaces }, 'z', filmIn(input, 'length')),
    ]),
    ...heldNumbers(
      input,
      Math.min(
        reachOf({ size: input.width, faces: input.widthFaces }),
        reachOf({ size: input.height, faces: input.heightFaces }),
        reachOf({ size: input.length, faces: input.lengthFaces }),
      ),
    ),
  }),
  checks: (input) => [
    pointsCheck(input, Math.max(input.width, input.height, input.length)),
    ...productBalance(solve, input, input.width * input.height * input.length, [
      { shape: 'slab', reach: reachOf({ size: input.width, faces: input.widthFaces }), film: filmIn(input, 'width') },
      {
        shape: 'slab',
        reach: reachOf({ size: input.height, faces: input.heightFaces }),
        film: filmIn(input, 'height'),
      },
      {
        shape: 'slab',
        reach: reachOf({ size: input.length, faces: input.lengthFaces }),
        film: filmIn(input, 'length'),
      },
    ]),
  ],
  warnings: productWarnings,
})
