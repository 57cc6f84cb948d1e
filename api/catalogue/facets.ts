import { type Case, type Family, type Sketch, outputNamesOf, outputOf } from '../../solvers/case.ts'
import type { FieldEntry } from './fields.ts'

/* By what the catalogue is narrowed: words for what the cases say of themselves, and what follows from it. */

export const familyTexts: Record<Family, { title: string; text: string }> = {
  'half-space': { title: 'Half space', text: 'Deep enough that the back is not felt' },
  slab: { title: 'Slab', text: 'Flat, heat crosses one way' },
  round: { title: 'Cylinder and sphere', text: 'Round, heat moves along the radius' },
  product: { title: 'Bar, brick, edge', text: 'Heat comes from two or three sides' },
  source: { title: 'Sources', text: 'Heat set free inside a wide body' },
  lumped: { title: 'One temperature', text: 'Small or well mixed' },
}

const bodies: Record<Sketch['body'], string> = {
  'half-space': 'Half space',
  slab: 'Slab',
  cylinder: 'Cylinder',
  'hollow-cylinder': 'Hollow cylinder',
  hole: 'Hole in a wide body',
  sphere: 'Sphere',
  bar: 'Bar',
  brick: 'Brick',
  'short-cylinder': 'Short cylinder',
  'bar-end': 'End of a bar',
  edge: 'Edge',
  corner: 'Corner',
  'two-bodies': 'Two bodies',
  endless: 'Without faces',
  lumped: 'One temperature',
}

const boundaries: Record<Sketch['boundary'], string> = {
  temperature: 'Surface temperature',
  convection: 'Convection',
  flux: 'Heat flux',
  ramp: 'Ramp',
  cycle: 'Cycle',
  'two-sides': 'Two sides',
  contact: 'Contact',
  source: 'Heat inside',
  bath: 'Stirred bath',
}

interface Question {
  title: string
  answeredBy(c: Case, operations: readonly string[]): boolean
}

const questions: Record<string, Question> = {
  'how-hot': { title: 'How hot', answeredBy: (c) => 'temperature' in c.outputs },
  when: { title: 'When', answeredBy: (_, operations) => operations.includes('time-to-reach') },
  'how-deep': { title: 'How deep', answeredBy: (_, operations) => operations.includes('depth-reached') },
  'how-much-heat': {
    title: 'How much heat',
    answeredBy: (c) => outputNamesOf(c).some((name) => outputOf(c, name).unit.startsWith('J')),
  },
  extremes: { title: 'Highest and lowest', answeredBy: (_, operations) => operations.includes('extremes') },
  chart: { title: 'A chart', answeredBy: (_, operations) => operations.includes('chart') },
}

const titles: Record<string, { title: string; match: 'any' | 'all'; values: Record<string, string> }> = {
  body: { title: 'Body', match: 'any', values: bodies },
  boundary: { title: 'Boundary', match: 'any', values: boundaries },
  question: {
    title: 'Question',
    match: 'all',
    values: Object.fromEntries(Object.entries(questions).map(([id, { title }]) => [id, title])),
  },
}

/** What a case is found by. A face whose kind is chosen in the call counts with every kind that it may be. */
export function facetsOf(c: Case, fields: readonly FieldEntry[], operations: readonly string[]) {
  const chosen = fields.flatMap((field) => field.kinds ?? []).map(({ kind }) => kind)
  const acting = [c.sketch.boundary, ...chosen.filter((kind) => Object.hasOwn(boundaries, kind))]
  const answered = Object.entries(questions).filter(([, { answeredBy }]) => answeredBy(c, operations))
  return { body: [c.sketch.body], boundary: [...new Set(acting)], question: answered.map(([id]) => id) }
}

/** The facets with the values that occur, in the order in which they stand here. */
export function facetsAmong(found: readonly Record<string, readonly string[]>[]) {
  return Object.entries(titles).map(([id, { title, match, values }]) => ({
    id,
    title,
    match,
    values: Object.entries(values)
      .filter(([value]) => found.some((one) => one[id]?.includes(value)))
      .map(([value, name]) => ({ id: value, title: name })),
  }))
}
