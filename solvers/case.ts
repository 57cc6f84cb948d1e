import type { z } from 'zod'
import type { CautionId } from './cautions.ts'
import { type Issue, DomainError } from './errors.ts'
import type { NumberName } from './number-catalogue.ts'
import { type OutputDescription, type OutputName, type Shape, outputCatalogue } from './outputs.ts'
import type { Solution } from './solution.ts'
import type { Warning } from './warnings.ts'

/** A statement about the input that the reader can check, with the figures compared. */
export interface Check {
  id: string
  holds: boolean
  value: number
  limit: number
  text: string
}

/** Numbers that an expert looks at first, each described where the contract is made (numberCatalogue). */
export type Numbers = Partial<Record<NumberName, number | number[]>>

/**
 * Where an answer has places: depths inward from the exposed face, radii from the axis or centre, either of the two,
 * points of a body of two or three dimensions, or none.
 */
export type Places = 'depths' | 'radii' | 'depths-or-radii' | 'points' | 'none'

export type PointAxis = 'x' | 'y' | 'z' | 'r'
export type Point = Partial<Record<PointAxis, number>>

/** What every resolved input has beside the case's own: SI, defaults filled in, refusals made. */
export interface Resolved {
  times: number[]
  depths?: number[]
  radii?: number[]
  points?: Point[]
  outputs: OutputName[]
}

/** Signs for the small drawing of the case. */
export interface Sketch {
  body:
    | 'half-space'
    | 'slab'
    | 'lumped'
    | 'cylinder'
    | 'sphere'
    | 'hollow-cylinder'
    | 'hole'
    | 'bar'
    | 'brick'
    | 'short-cylinder'
    | 'bar-end'
    | 'edge'
    | 'corner'
    | 'two-bodies'
    | 'endless'
  boundary: 'convection' | 'temperature' | 'flux' | 'ramp' | 'cycle' | 'contact' | 'two-sides' | 'source' | 'bath'
}

/** How the catalogue groups the cases. */
export type Family = 'lumped' | 'half-space' | 'slab' | 'round' | 'product' | 'source'

/**
 * An analytical case, described once. Its route, validation, contract entry, page, form, snippets, price and common
 * tests are read from here.
 */
export interface CaseDescription<Shape_ extends z.ZodRawShape, R extends Resolved> {
  id: string
  title: string
  /** One sentence: the body and what happens to it. */
  summary: string
  /** What it is for, what it assumes, and where it stops; plain sentences. */
  notes: string
  /** The formula in TeX, one entry a line. */
  formula: readonly string[]
  sources: readonly string[]
  family: Family
  sketch: Sketch
  /** The case's own fields. Times, depths, outputs and detail are added by the operation. */
  fields: Shape_
  places: Places
  /** The coordinates of a point, where places are points. */
  pointAxes?: readonly PointAxis[]
  /** Of these, the ones that only some bodies of the case have. */
  optionalAxes?: readonly PointAxis[]
  /** From where to where a body lies, by axis, in m; an axis that is left out has no meaning for it. */
  pointRanges?(input: Record<string, unknown>): Partial<Record<PointAxis, readonly [number, number]>>
  /** Depths may be negative, in the other of two bodies. */
  signedDepths?: true
  /** Times are of a clock and may be negative: a settled cycle has no start. */
  clock?: true
  /** The field that says where the body ends, so that no depth or radius may lie beyond; absent where no one field does. */
  depthsEndAt?: string & keyof Shape_
  /** The field that says at which radius a body with a hole begins. */
  radiiBeginAt?: string & keyof Shape_
  /** The fields that give the body a length of 1, where it may also be asked by biot, fourier and positionRatio. */
  dimensionless?: Readonly<Record<string, number>>
  /** The field with the temperature that the body is driven to; absent where no one field says it. */
  drive?: string & keyof Shape_
  outputs: Partial<Record<OutputName, Partial<Pick<OutputDescription, 'unit' | 'shape' | 'text'>>>>
  /** Outputs that a reader would expect and the case cannot have, each with the reason. */
  absentOutputs: Partial<Record<OutputName, string>>
  /** Priced points per number, and once per call. */
  weight: number
  setUp: number
  cautions: readonly CautionId[]
  example: Record<string, unknown>
  /** Other ways to state the case, each a whole input; the common tests vary their numbers as they do the example's. */
  variants?: readonly { title: string; input: Record<string, unknown> }[]
  /** SI, defaults and every refusal of the domain; pushes an issue for each thing refused. */
  resolve(input: ParsedInput<Shape_>, refuse: (issue: Issue) => void): R
  solve(input: R): Solution
  /** The input as echoed in the answer, where it is not what the solver reads. */
  echo?(input: R): Record<string, unknown>
  /**
   * The temperature that the body ends at there, or null where it has none: it grows without end, or goes on with a
   * cycle. Left out or undefined, it is the steady temperature if that is an output, else the field that drives the body.
   */
  end?(input: R, place: number | Point | undefined): number | null | undefined
  numbers(input: R): Numbers
  checks(input: R): Check[]
  warnings(input: R): Warning[]
  /**
   * Whether a body that the case simplifies comes to a temperature later than answered (the answer errs early) or sooner (late);
   * undefined where the case says of the body all that was stated of it.
   */
  errs?(input: R): 'early' | 'late' | undefined
  /** Unit of an output where it depends on the input. */
  unitOf?(output: OutputName, input: R): string | undefined
}

export type ParsedInput<S extends z.ZodRawShape> = z.infer<z.ZodObject<S>> & {
  times: number[]
  depths?: number[] | undefined
  radii?: number[] | undefined
  points?: Point[] | undefined
  outputs: OutputName[]
}

/** The fields in which a case takes its places. */
export const placeFields = {
  depths: ['depths'],
  radii: ['radii'],
  'depths-or-radii': ['depths', 'radii'],
  points: ['points'],
  none: [],
} as const satisfies Record<Places, readonly ('depths' | 'radii' | 'points')[]>

/** How many places were asked for. */
export function countOfPlaces({ depths, radii, points }: Pick<Resolved, 'depths' | 'radii' | 'points'>): number {
  return (depths ?? radii ?? points ?? []).length
}

/** A case with its types hidden, as the lists and operations hold it. */
export type Case = Omit<
  CaseDescription<z.ZodRawShape, Resolved>,
  'resolve' | 'depthsEndAt' | 'radiiBeginAt' | 'drive'
> & {
  depthsEndAt?: string
  radiiBeginAt?: string
  drive?: string
  /** Throws DomainError. */
  resolve(input: Record<string, unknown>): Resolved
}

export function defineCase<S extends z.ZodRawShape, R extends Resolved>(description: CaseDescription<S, R>): Case {
  const resolve = (input: Record<string, unknown>): R => {
    const issues: Issue[] = []
    const resolved = description.resolve(input as ParsedInput<S>, (issue) => issues.push(issue))
    if (issues.length > 0) throw new DomainError(issues)
    return resolved
  }
  // Rates and sensitivities follow from the temperatures of any case.
  const { temperature, ...others } = description.outputs
  const outputs = temperature ? { temperature, rate: {}, sensitivities: {}, ...others } : others
  return { ...(description as unknown as Case), outputs, resolve }
}

export function outputOf(c: Case, name: OutputName): OutputDescription {
  return { ...outputCatalogue[name], ...c.outputs[name] }
}

export function shapeOf(c: Case, name: OutputName): Shape {
  return outputOf(c, name).shape
}

export function outputNamesOf(c: Case): OutputName[] {
  return Object.keys(c.outputs) as OutputName[]
}
