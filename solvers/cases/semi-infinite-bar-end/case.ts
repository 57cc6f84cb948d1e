import { heldHalfSpaceNumbers } from '../../bodies/held-face.ts'
import { defineCase } from '../../case.ts'
import type { Issue } from '../../errors.ts'
import { radius, thickness } from '../../statement/fields.ts'
import {
  absentHeat,
  ENDLESS,
  facesAcross,
  height,
  type PointRanges,
  pointsCheck,
  productFields,
  productOutputs,
  type ProductResolved,
  rangeAcross,
  refusePoints,
  width,
} from '../../bodies/product-case.ts'
import { driveFields, productWarnings, resolveDrive } from '../../bodies/product-drive.ts'
import { productEnd } from '../../bodies/product-films.ts'
import { resolveSolid } from '../../statement/solid.ts'
import { type BarEndInput, type Section, solve } from './solve.ts'

const sectionFields = {
  radius: radius.optional(),
  thickness: thickness.optional(),
  thicknessFaces: facesAcross('thickness').optional(),
  width: width.optional(),
  height: height.optional(),
  widthFaces: facesAcross('width').optional(),
  heightFaces: facesAcross('height').optional(),
}

const fields = {
  ...productFields,
  ...sectionFields,
  ...driveFields({ side: 'all faces along the bar', end: 'its end' }),
}

type SectionInput = { [name in keyof typeof sectionFields]?: number | undefined }
type Body = BarEndInput & ProductResolved & SectionInput

const kinds = {
  round: ['radius'],
  plate: ['thickness', 'thicknessFaces'],
  rectangle: ['width', 'height', 'widthFaces', 'heightFaces'],
} as const satisfies Record<Section['kind'], readonly (keyof SectionInput)[]>

const ways = 'radius, or thickness with thicknessFaces, or width and height with widthFaces and heightFaces'

/** The one section that was given; refuses none, a part and two. */
function resolveSection(input: SectionInput, refuse: (issue: Issue) => void): Section | undefined {
  const named = (Object.keys(kinds) as Section['kind'][]).filter((kind) =>
    kinds[kind].some((name) => input[name] !== undefined),
  )
  const accepted = `exactly one of ${ways}`
  const [kind, second] = named
  if (kind === undefined) {
    refuse({ pointer: '#/radius', code: 'missing-field', detail: 'The section of the bar is missing.', accepted })
    return undefined
  }
  if (second !== undefined) {
    const other = kinds[second].find((name) => input[name] !== undefined)!
    const detail = `The section is given twice: as ${kind} and as ${second}.`
    refuse({ pointer: `#/${other}`, code: 'conflicting-fields', detail, accepted })
    return undefined
  }
  const missing = kinds[kind].filter((name) => input[name] === undefined)
  for (const name of missing)
    refuse({ pointer: `#/${name}`, code: 'missing-field', detail: `A ${kind} needs ${name}.`, accepted })
  return missing.length === 0 ? sectionOf(input) : undefined
}

/** Of an input whose section is whole. */
function sectionOf(input: SectionInput): Section {
  const faces = (name: keyof SectionInput) => (input[name] === 2 ? 2 : 1)
  if (input.radius !== undefined) return { kind: 'round', radius: input.radius }
  if (input.thickness !== undefined)
    return { kind: 'plate', thickness: input.thickness, thicknessFaces: faces('thicknessFaces') }
  return {
    kind: 'rectangle',
    width: input.width!,
    height: input.height!,
    widthFaces: faces('widthFaces'),
    heightFaces: faces('heightFaces'),
  }
}

function rangesOf(section: Section): PointRanges {
  if (section.kind === 'round') return { x: ENDLESS, r: [0, section.radius] }
  if (section.kind === 'plate') return { x: ENDLESS, y: rangeAcross(section.thickness, section.thicknessFaces) }
  return {
    x: ENDLESS,
    y: rangeAcross(section.width, section.widthFaces),
    z: rangeAcross(section.height, section.heightFaces),
  }
}

export default defineCase<typeof fields, Body>({
  id: 'semi-infinite-bar-end',
  title: 'End of a long bar or plate',
  summary: 'The end of a rod or bar, or the edge of a plate, at one temperature meets a fluid or is held at another.',
  notes:
    'For rod ends, stubs, the edges of panels and slabs, and bars that one end of is looked at. x is the distance from the end. The section is round (points with r), a plate (points with y) or a rectangle (points with y along the width and z along the height); y and z run from the mid-plane where both faces are exposed, from the insulated face where one is. Far from the end the answer is that of the section alone. All faces that are exposed meet the same fluid or are held at the same temperature, the start is uniform and nothing is generated: only then is the product of one-dimensional answers exact. The film of the end may differ from that of the side.',
  formula: [
    '\\theta = \\theta_\\infty(x)\\,\\theta_{\\mathrm{section}}, \\qquad 1 - \\theta = u_\\infty + u_{\\mathrm{section}} - u_\\infty u_{\\mathrm{section}}',
    '\\theta_\\infty(x) = \\operatorname{erf}(\\eta) + e^{-\\eta^2} \\operatorname{erfcx}(\\eta + \\beta), \\qquad \\eta = \\frac{x}{2\\,(at)^{1/2}}, \\qquad \\beta = \\frac{h\\,(at)^{1/2}}{k}',
  ],
  sources: ['H. S. Carslaw, J. C. Jaeger, Conduction of Heat in Solids, 2nd ed. 1959, sections 5.6 and 8.4'],
  family: 'product',
  sketch: { body: 'bar-end', boundary: 'convection' },
  fields,
  places: 'points',
  pointAxes: ['x', 'y', 'z', 'r'],
  optionalAxes: ['y', 'z', 'r'],
  pointRanges: (input) => rangesOf(sectionOf(input)),
  outputs: productOutputs,
  absentOutputs: absentHeat,
  weight: 2,
  setUp: 6,
  cautions: ['concrete', 'general'],
  example: {
    conductivity: 50,
    density: 7800,
    specificHeat: 460,
    radius: 0.03,
    filmCoefficient: 300,
    initialTemperature: 20,
    ambientTemperature: 600,
    points: [
      { x: 0.01, r: 0 },
      { x: 0, r: 0.03 },
    ],
    times: [60, 600],
  },
  variants: [
    {
      title: 'Edge of a plate on an insulated bed, films of their own, all outputs',
      input: {
        conductivity: 1.7,
        volumetricHeatCapacity: 2.1e6,
        thickness: 0.2,
        thicknessFaces: 1,
        filmCoefficients: { side: 25, end: 10 },
        initialTemperature: 18,
        ambientTemperature: -12,
        points: [
          { x: 0, y: 0.2 },
          { x: 0.1, y: 0 },
        ],
        times: [3600, 36000],
        outputs: ['temperature', 'remainingFraction', 'completedFraction'],
      },
    },
    {
      title: 'End of a rectangular beam, held surface',
      input: {
        conductivity: 0.15,
        diffusivity: 1.4e-7,
        width: 0.08,
        height: 0.16,
        widthFaces: 2,
        heightFaces: 2,
        surfaceTemperature: 70,
        initialTemperature: 20,
        points: [{ x: 0.02, y: 0.01, z: -0.05 }],
        times: [1800, 14400],
      },
    },
  ],
  resolve(input, refuse): Body {
    const solid = resolveSolid(input, refuse)
    const { initialTemperature, times, outputs } = input
    const section = resolveSection(input, refuse)
    const points = input.points ?? []
    if (section) refusePoints(points, rangesOf(section), refuse)
    const drive = resolveDrive(input, refuse)
    return { ...solid!, ...givenOf(input), section: section!, initialTemperature, ...drive, points, times, outputs }
  },
  solve,
  // The section is echoed by the fields that it was given in.
  echo: (input) => ({ ...input, section: undefined }),
  end: productEnd,
  numbers: (input) => (input.surfaceTemperature === undefined ? {} : heldHalfSpaceNumbers(input)),
  checks: (input) => [pointsCheck(input, ENDLESS[1])],
  warnings: productWarnings,
})

function givenOf(input: SectionInput): SectionInput {
  const names = Object.keys(sectionFields) as (keyof SectionInput)[]
  return Object.fromEntries(names.flatMap((name) => (input[name] === undefined ? [] : [[name, input[name]]])))
}
