import fc from 'fast-check'
import type { Case } from '../../../solvers/case.ts'
import { decades } from '../draw.ts'

/* Inputs of the size that people ask: the example and the variants of a case with every number moved by up to a factor. */

const sizes = /^(depths|radii|points|x|y|z|r|thickness|radius|width|height|length|innerRadius|outerRadius)$/
const kept = /Faces$|^time(OfMaximum|OfMinimum)$/

type Move = (name: string, value: number) => number

function moved(value: unknown, move: Move, name = ''): unknown {
  if (typeof value === 'number') return kept.test(name) ? value : move(name, value)
  if (Array.isArray(value)) return value.map((one) => moved(one, move, name))
  if (typeof value !== 'object' || value === null) return value
  return Object.fromEntries(Object.entries(value).map(([key, inner]) => [key, moved(inner, move, key)]))
}

const isTemperature = (name: string) => /temperature$|^temperatures$|^values$|^cycleMean$|^start$/i.test(name)

/** Sizes keep their proportions, and so do times: what lies inside a body or a history stays there. */
export function nearby(c: Case): fc.Arbitrary<Record<string, unknown>> {
  const stated = [c.example, ...(c.variants ?? []).map(({ input }) => input)]
  const factor = decades(0.1 ** 0.5, 10 ** 0.5)
  return fc
    .record({
      base: fc.constantFrom(...stated),
      size: factor,
      time: factor,
      others: fc.array(factor, { minLength: 12, maxLength: 12 }),
    })
    .map(({ base, size, time, others }) => {
      let next = 0
      return moved(base, (name, value) => {
        if (sizes.test(name)) return value * size
        if (name === 'times') return value * time
        const own = others[next++ % others.length]!
        return isTemperature(name) ? value + 5 * Math.log10(own) : value * own
      }) as Record<string, unknown>
    })
}
