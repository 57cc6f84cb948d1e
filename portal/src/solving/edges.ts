import type { Edge } from '../figure/field.ts'
import { type Described, numberIn } from './described.ts'
import type { Body } from './body.ts'
import type { Answer } from './solve.ts'

/* What lies before and behind the shown part of a body, from the case's own description and the input as used. */

/** The sides whose kind is chosen in the call, in the order of their fields. */
export function sidesIn(c: Described, input: Body): Body[] {
  const sides = c.fields.filter(({ kinds }) => kinds?.some(({ kind }) => kind === 'insulated'))
  return sides.flatMap(({ name }) => (input[name] ? [input[name] as Body] : []))
}

function edgeOfSide(side: Body): Edge {
  const [surface, ambient] = [side['surfaceTemperature'], side['ambientTemperature']]
  if (typeof surface === 'number') return { kind: 'held', level: surface }
  if (typeof ambient === 'number') return { kind: 'film', level: ambient }
  return side['kind'] === 'insulated' ? { kind: 'insulated' } : { kind: 'acting', sign: String(side['kind']) }
}

/** One side alone is the far one where the near face has a sign of its own. */
export function edgesOf(c: Described, answer: Answer): { near: Edge; far: Edge | undefined } {
  const [first, second] = sidesIn(c, answer.input)
  if (first && second) return { near: edgeOfSide(first), far: edgeOfSide(second) }
  const own = ownEdge(c, answer)
  if (first && c.depthsEndAt === null) return { near: edgeOfSide(first), far: undefined }
  return { near: own, far: first && edgeOfSide(first) }
}

function ownEdge(c: Described, answer: Answer): Edge {
  const { boundary } = c.sketch
  const level = numberIn(answer, c.drive)
  if (boundary === 'contact') return { kind: 'endless' }
  if (level === undefined) return { kind: 'acting', sign: boundary }
  return boundary === 'temperature' ? { kind: 'held', level } : { kind: 'film', level }
}
