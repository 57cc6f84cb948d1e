import { type Case, placeFields } from '../case.ts'
import { DomainError, type Issue } from '../errors.ts'
import type { OutputName } from '../outputs.ts'
import { answeredShape } from './solve-schemas.ts'

/** An input that has been read, before its case resolves it. */
export type Read = Record<string, unknown> & {
  depths?: number[]
  radii?: number[]
  points?: Record<string, number>[]
  times: number[]
  outputs: OutputName[]
}

const placesAccepted = {
  depths: 'a list of depths in m, inward from the exposed face',
  radii: 'a list of radii in m',
  'depths-or-radii': 'exactly one of depths (m, inward from the face) and radii (m)',
  points: 'a list of points',
  none: 'no places',
}

const needsPlaces = (c: Case, name: OutputName) =>
  c.places !== 'none' && ['grid', 'grids', 'places'].includes(answeredShape(c, name))

/** Places that are missing, given in two ways, or outside the body. */
export function refusePlaces(c: Case, input: Read): void {
  const names = placeFields[c.places]
  const given = names.filter((name) => input[name] !== undefined)
  const accepted = placesAccepted[c.places]
  if (given.length > 1) {
    const detail = 'The places are given twice: by depths and by radii.'
    throw new DomainError([{ pointer: '#/radii', code: 'conflicting-fields', detail, accepted }])
  }
  const placed = input.outputs.find((name) => needsPlaces(c, name))
  if (placed && given.length === 0) {
    const detail = `${placed} needs ${names.join(' or ')}.`
    throw new DomainError([{ pointer: `#/${names[0]}`, code: 'missing-field', detail, accepted }])
  }
  const issues = placesOutside(c, input)
  if (issues.length > 0) throw new DomainError(issues)
}

/** An issue for each place beyond the end of the body, or in its hole. */
export function placesOutside(c: Case, input: Pick<Read, 'depths' | 'radii'> & Record<string, unknown>): Issue[] {
  const sizeOf = (name: string | undefined) => {
    const size = name === undefined ? undefined : input[name]
    return typeof size === 'number' ? size : undefined
  }
  const end = sizeOf(c.depthsEndAt)
  const begin = sizeOf(c.radiiBeginAt) ?? 0
  if (end === undefined && begin === 0) return []
  const accepted = end === undefined ? `${begin} m or more` : `${begin} to ${end} m`
  return (['depths', 'radii'] as const).flatMap((name) =>
    (input[name] ?? []).flatMap((place, j) => {
      const short = place < begin
      if (!short && !(end !== undefined && place > end)) return []
      const where = short ? `begins at ${begin}` : `ends at ${end}`
      const detail = `The body ${where} m; this ${name === 'depths' ? 'depth' : 'radius'} is ${place} m.`
      return [{ pointer: `#/${name}/${j}`, code: 'depth-outside-body' as const, detail, accepted }]
    }),
  )
}
