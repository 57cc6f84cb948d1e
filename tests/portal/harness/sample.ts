import { describedCase } from '../../../api/catalogue/describe.ts'
import { type Field, controlOf } from '../../../portal/src/features/cases/fields.ts'
import { cases } from '../../../solvers/cases/index.ts'

/** What the page of a case is made of: the drawn body and what acts on it, the controls of its fields, its places. */
export function featuresOf(id: string): string[] {
  const c = describedCase(id)
  if (!c) throw new Error(`there is no case ${id}`)
  const fields = c.fields as unknown as Field[]
  const inside = fields.flatMap((field) => [
    ...(field.fields ?? []),
    ...(field.kinds ?? []).flatMap((kind) => kind.fields),
  ])
  const shapes = c.outputs.map(({ shape }) => `shape ${shape}`)
  return [
    `body ${c.sketch.body}`,
    `boundary ${c.sketch.boundary}`,
    `places ${c.places}`,
    ...fields.map((field) => `control ${controlOf(field)}`),
    ...inside.map((field) => `inside ${controlOf(field)}`),
    ...shapes,
  ]
}

/** As few cases as a greedy choice needs so that every feature of any case is among theirs. */
export function sampleOfCases(): string[] {
  const left = new Set(cases.flatMap(({ id }) => featuresOf(id)))
  const chosen: string[] = []
  while (left.size > 0) {
    const [best] = cases
      .map(({ id }) => ({ id, gain: new Set(featuresOf(id).filter((one) => left.has(one))).size }))
      .sort((a, b) => b.gain - a.gain)
    chosen.push(best!.id)
    featuresOf(best!.id).forEach((one) => left.delete(one))
  }
  return chosen
}
