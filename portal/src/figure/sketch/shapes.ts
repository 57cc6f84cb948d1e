import type { Hatch } from '../hatches.tsx'
import { blockBodies } from './block-bodies.tsx'
import type { BodyShape } from './body-shape.ts'
import { flatBodies } from './flat-bodies.tsx'
import { otherBodies } from './other-bodies.tsx'
import { roundBodies } from './round-bodies.tsx'

const shapes: Record<string, BodyShape> = { ...flatBodies, ...roundBodies, ...blockBodies, ...otherBodies }

/** How a body is drawn; one that is not known yet has one temperature. */
export const shapeOf = (body: string): BodyShape => shapes[body] ?? shapes['lumped']!

export const hatchFor = (body: string): Hatch => shapeOf(body).hatch

/** What acts on the first face, and on the second, by the boundary of a case. */
export function actingOn(body: string, boundary: string): { first: string; second: string } {
  if (boundary === 'two-sides') return { first: 'convection', second: 'temperature' }
  // Heat is set free inside: the faces have a fluid before them.
  if (boundary === 'source') return { first: 'convection', second: 'convection' }
  const onlyOne = body === 'slab' && boundary === 'flux'
  return { first: boundary, second: onlyOne ? 'insulated' : boundary }
}
