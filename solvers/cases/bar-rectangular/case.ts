import { productBalance } from '../../bodies/product-balance.ts'
import { heldNumbers } from '../../bodies/held-face.ts'
import { defineCase } from '../../case.ts'
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
  width,
} from '../../bodies/product-case.ts'
import { driveFields, productWarnings, resolveDrive } from '../../bodies/product-drive.ts'
import { filmIn, productEnd } from '../../bodies/product-films.ts'
import { slabDirection, reachOf } from '../../bodies/product-step.ts'
import { resolveSolid } from '../../statement/solid.ts'
import { solve, type BarInput } from './solve.ts'

type Body = BarInput & ProductResolved

const fields = {
  ...productFields,
  width,
  height,
  widthFaces: facesAcross('width'),
  heightFaces: facesAcross('height'),
  ...driveFields({ width: 'the faces across the width', height: 'the faces across the height' }),
}

const rangesOf = (body: Pick<Body, 'width' | 'height' | 'widthFaces' | 'heightFaces'>): PointRanges => ({
  x: rangeAcross(body.width, body.widthFaces),
  y: rangeAcross(body.height, body.heightFaces),
})

export default defineCase<typeof fields, Body>({
  id: 'bar-rectangular',
  title: 'Rectangular bar',
  summary: 'A long bar of rectangular section at one temperature meets a fluid at another, or is held at another.',
  notes:
    'For beams, studs, columns and bars that are long against their section. x runs along the width and y along the height, from the mid-plane where both faces are exposed, from the insulated face where one is. All faces that are exposed meet the same fluid or are held at the same temperature, the start is uniform and nothing is generated: only then is the product of one-dimensional answers exact. A film may differ from one direction to the other.',
  formula: [
    '\\theta = \\theta_w(x)\\,\\theta_h(y), \\qquad 1 - \\theta = u_w + u_h - u_w u_h',
    '\\frac{Q}{Q_0} = H_w + H_h - H_w H_h, \\qquad H = 1 - \\bar\\theta',
  ],
  sources: ['H. S. Carslaw, J. C. Jaeger, Conduction of Heat in Solids, 2nd ed. 1959, section 5.6'],
  family: 'product',
  sketch: { body: 'bar', boundary: 'convection' },
  fields,
  places: 'points',
  pointAxes: ['x', 'y'],
  pointRanges: (input) => rangesOf(input as unknown as Body),
  outputs: closedOutputs('J/m'),
  absentOutputs: absentFluxes,
  weight: 2,
  setUp: 6,
  cautions: ['concrete', 'general'],
  example: {
    conductivity: 1.7,
    density: 2300,
    specificHeat: 900,
    width: 0.3,
    height: 0.5,
    widthFaces: 2,
    heightFaces: 2,
    filmCoefficient: 15,
    initialTemperature: 20,
    ambientTemperature: -5,
    points: [
      { x: 0, y: 0 },
      { x: 0.15, y: 0.25 },
    ],
    times: [7200, 36000],
  },
  variants: [
    {
      title: 'One face insulated, films of their own, all outputs',
      input: {
        conductivity: 0.13,
        volumetricHeatCapacity: 8e5,
        width: 0.12,
        height: 0.2,
        widthFaces: 1,
        heightFaces: 2,
        filmCoefficients: { width: 25, height: 8 },
        initialTemperature: 18,
        ambientTemperature: 60,
        points: [
          { x: 0.05, y: -0.04 },
          { x: 0.12, y: 0.1 },
        ],
        times: [1800, 14400],
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
        conductivity: 45,
        diffusivity: 1.2e-5,
        width: 0.05,
        height: 0.08,
        widthFaces: 2,
        heightFaces: 1,
        surfaceTemperature: 40,
        initialTemperature: 800,
        times: [5, 60],
        outputs: ['heatGained', 'meanTemperature', 'heatFraction'],
      },
    },
  ],
  resolve(input, refuse): Body {
    const solid = resolveSolid(input, refuse)
    const { initialTemperature, times, outputs, width, height, widthFaces, heightFaces } = input
    const own = { width, height, widthFaces, heightFaces }
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
    ]),
    ...heldNumbers(
      input,
      Math.min(
        reachOf({ size: input.width, faces: input.widthFaces }),
        reachOf({ size: input.height, faces: input.heightFaces }),
      ),
    ),
  }),
  checks: (input) => [
    pointsCheck(input, Math.max(input.width, input.height)),
    ...productBalance(solve, input, input.width * input.height, [
      { shape: 'slab', reach: reachOf({ size: input.width, faces: input.widthFaces }), film: filmIn(input, 'width') },
      {
        shape: 'slab',
        reach: reachOf({ size: input.height, faces: input.heightFaces }),
        film: filmIn(input, 'height'),
      },
    ]),
  ],
  warnings: productWarnings,
})
