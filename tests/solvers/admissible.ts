import fc from 'fast-check'
import { z } from 'zod'
import type { Case } from '../../solvers/case.ts'
import { solve } from '../../solvers/operations/solve.ts'
import { uniform } from './draw.ts'

/*
 * Inputs over the whole admissible ranges, made from the description of a case alone: its example and variants say which
 * fields stand together, its fields what each may be. The ends of a range and zero come up more often than by chance.
 */

type Input = Record<string, unknown>

export interface Field {
  minimum?: number
  maximum?: number
  const?: unknown
  'x-zero-or'?: number
  'x-ucum'?: string
  items?: Field
  properties?: Record<string, Field>
  anyOf?: Field[]
  oneOf?: Field[]
}

/** Log-uniform where a range spans decades of one sign, uniform where it does not. */
function within(field: Field): fc.Arbitrary<number> {
  const from = field['x-zero-or'] ?? field.minimum!
  const to = field.maximum!
  if (from < 0) return twoSided(from, to)
  const low = Math.log(Math.max(from, 1e-12))
  const inside = uniform.map((u) => Math.min(to, Math.max(from, Math.exp(low + (Math.log(to) - low) * u))))
  const ends = from === 0 || field['x-zero-or'] !== undefined ? [0, to] : [from, to]
  const tiny = from === 0 ? [5e-324, 1e-300, 1e-200] : []
  return fc.oneof({ weight: 15, arbitrary: inside }, { weight: 1, arbitrary: fc.constantFrom(...ends, ...tiny) })
}

/** Both signs: by decades where the range spans many, else evenly. */
function twoSided(from: number, to: number): fc.Arbitrary<number> {
  const even = uniform.map((u) => from + u * (to - from))
  const decades = uniform.map((u) => {
    const v = 2 * u - 1
    return Math.sign(v) * Math.min(v < 0 ? -from : to, 1e-6 * (to / 1e-6) ** Math.abs(v))
  })
  return fc.oneof(
    { weight: 12, arbitrary: to > 1e5 ? decades : even },
    { weight: 1, arbitrary: fc.constantFrom(from, 0, to) },
  )
}

const someOf = <T>(value: fc.Arbitrary<T>) => fc.array(value, { minLength: 1, maxLength: 3 })
/** Places as shares of the body, where it ends. */
const share = fc.oneof(uniform, fc.constantFrom(0, 0.5, 1))

const placeNames = ['depths', 'radii']

/** A value as stated, each number of it anywhere in its range. */
function varied(c: Case, stated: unknown, field: Field | undefined, name = ''): fc.Arbitrary<unknown> {
  if (typeof stated === 'number')
    return field?.maximum !== undefined && field.minimum !== undefined ? within(field) : fc.constant(stated)
  if (Array.isArray(stated) && typeof stated[0] === 'number' && field?.items)
    return placeNames.includes(name) && (c.depthsEndAt || c.radiiBeginAt) ? someOf(share) : someOf(within(field.items))
  if (name === 'points' && c.pointRanges)
    return someOf(fc.record(Object.fromEntries(Object.keys((stated as Input[])[0]!).map((axis) => [axis, share]))))
  if (Array.isArray(stated) && typeof stated[0] === 'object' && field?.items)
    return someOf(varied(c, stated[0], field.items))
  if (typeof stated !== 'object' || stated === null || Array.isArray(stated)) return fc.constant(stated)
  const own = propertiesOf(field, stated as Input)
  return fc.record(Object.fromEntries(Object.entries(stated).map(([key, v]) => [key, varied(c, v, own[key], key)])))
}

/** The fields of an object; of alternatives, those of the kind that it is. */
export function propertiesOf(field: Field | undefined, stated: Input): Record<string, Field> {
  const options = field?.anyOf ?? field?.oneOf
  const chosen = options?.find((one) => one.properties?.['kind']?.const === stated['kind']) ?? field
  return chosen?.properties ?? {}
}

/** Points that were drawn as shares of the body, laid into it; along an endless direction by decades. */
function withPoints(c: Case, body: Input): Input {
  const shares = body['points'] as Record<string, number>[] | undefined
  if (!shares || !c.pointRanges) return body
  const ranges = c.pointRanges(body) as Record<string, readonly [number, number]>
  const laid = ([from, to]: readonly [number, number], one: number) =>
    to === 1e5 && from === 0 ? to * 1e-14 ** (1 - one) * Math.sign(one) : Math.min(to, from + one * (to - from))
  const points = shares.map((point) =>
    Object.fromEntries(Object.entries(point).map(([axis, one]) => [axis, laid(ranges[axis]!, one)])),
  )
  return { ...body, points }
}

/** Places that were drawn as shares of the body, laid into it. */
function placed(c: Case, body: Input): Input {
  const sizeOf = (field: string | undefined) => (field === undefined ? undefined : (body[field] as number | undefined))
  const begin = sizeOf(c.radiiBeginAt) ?? 0
  const end = sizeOf(c.depthsEndAt)
  if (end === undefined && begin === 0) return body
  // A body without end is looked at up to the longest radius, by decades.
  const laidAt = (one: number) =>
    end === undefined
      ? Math.min(1e5, begin * (1e5 / begin) ** (one * one))
      : Math.min(end, Math.max(begin, begin + one * (end - begin)))
  const laid = placeNames.flatMap((name) => {
    const shares = body[name] as number[] | undefined
    return shares ? [[name, shares.map(laidAt)] as const] : []
  })
  return { ...body, ...Object.fromEntries(laid) }
}

/** Two radii of one body, drawn apart, would seldom make one: the outer is laid at a multiple of the inner. */
function hollowed(body: Input): Input {
  const { innerRadius, outerRadius } = body
  if (typeof innerRadius !== 'number' || typeof outerRadius !== 'number') return body
  const share = Math.log(outerRadius / 1e-9) / Math.log(1e5 / 1e-9)
  return { ...body, outerRadius: Math.min(1e5, innerRadius * Math.min(1e4, 1 + 1.001e-5 * 1e9 ** share)) }
}

/** A profile goes from face to face and has a temperature at each of its depths, which increase. */
function profiled(body: Input): Input {
  const { initialProfile, thickness: end } = body
  if (!initialProfile || typeof end !== 'number') return body
  const { depths, temperatures } = initialProfile as Record<'depths' | 'temperatures', number[]>
  const values = temperatures.length > 1 ? temperatures : [...temperatures, temperatures[0]!]
  // At most one depth between, sometimes at a face: then the profile jumps there.
  const share = Math.round(64 * Math.min(1, Math.max(0, (Math.log10(depths[0]! + 1e-12) + 12) / 17))) / 64
  const between = Array.from({ length: values.length - 2 }, () => share * end)
  return { ...body, initialProfile: { depths: [0, ...between, end], temperatures: values } }
}

export const schemaOf = (c: Case): Field => z.toJSONSchema(solve.input(c), { io: 'input' }) as Field

export function admissible(c: Case): fc.Arbitrary<Input> {
  const schema = schemaOf(c)
  const stated = [c.example, ...(c.variants ?? []).map((v) => v.input)]
  return fc
    .oneof(...stated.map((one) => varied(c, one, schema) as fc.Arbitrary<Input>))
    .map((body) => withPoints(c, placed(c, profiled(hollowed(body)))))
}
