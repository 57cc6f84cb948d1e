import fc from 'fast-check'
import { z } from 'zod'
import type { Case } from '../../solvers/case.ts'
import { solve } from '../../solvers/operations/solve.ts'

/*
 * Inputs over the whole admissible ranges, made from the description of a case alone: its example and variants say which
 * fields stand together, its fields what each may be. The ends of a range and zero come up more often than by chance.
 */

interface Field {
  minimum?: number
  maximum?: number
  'x-zero-or'?: number
  items?: Field
}

/** Log-uniform where a range spans decades of one sign, uniform where it does not. */
function within(field: Field): fc.Arbitrary<number> {
  const from = field['x-zero-or'] ?? field.minimum!
  const to = field.maximum!
  const unit = fc.double({ min: 0, max: 1, noNaN: true })
  if (from < 0)
    return fc.oneof(
      { weight: 12, arbitrary: unit.map((u) => from + u * (to - from)) },
      { weight: 1, arbitrary: fc.constantFrom(from, 0, to) },
    )
  const low = Math.log(Math.max(from, 1e-12))
  const inside = unit.map((u) => Math.min(to, Math.max(from, Math.exp(low + (Math.log(to) - low) * u))))
  const ends = from === 0 || field['x-zero-or'] !== undefined ? [0, to] : [from, to]
  const tiny = from === 0 ? [5e-324, 1e-300, 1e-200] : []
  return fc.oneof({ weight: 15, arbitrary: inside }, { weight: 1, arbitrary: fc.constantFrom(...ends, ...tiny) })
}

const someOf = (value: fc.Arbitrary<number>) => fc.array(value, { minLength: 1, maxLength: 3 })
/** Depths as shares of the body, where it ends. */
const shares = someOf(fc.oneof(fc.double({ min: 0, max: 1, noNaN: true }), fc.constantFrom(0, 0.5, 1)))

function varied(
  c: Case,
  stated: Record<string, unknown>,
  fields: Record<string, Field>,
): fc.Arbitrary<Record<string, unknown>> {
  const model = Object.fromEntries(
    Object.entries(stated).map(([name, value]) => {
      const field = fields[name]!
      if (name === 'depths' && c.depthsEndAt) return [name, shares]
      if (Array.isArray(value) && typeof value[0] === 'number') return [name, someOf(within(field.items!))]
      return [name, typeof value === 'number' && field.maximum !== undefined ? within(field) : fc.constant(value)]
    }),
  )
  return fc.record(model).map((body) => {
    const end = c.depthsEndAt && body[c.depthsEndAt]
    if (typeof end !== 'number' || !body['depths']) return body
    return { ...body, depths: (body['depths'] as number[]).map((share) => Math.min(end, share * end)) }
  })
}

export function admissible(c: Case): fc.Arbitrary<Record<string, unknown>> {
  const schema = z.toJSONSchema(solve.input(c), { io: 'input' }) as { properties: Record<string, Field> }
  const stated = [c.example, ...(c.variants ?? []).map((v) => v.input)]
  return fc.oneof(...stated.map((one) => varied(c, one, schema.properties)))
}
