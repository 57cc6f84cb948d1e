/**
 * What a solver may refuse. Each code stands in `errors[]` of a 422 and has its own page in the portal;
 * api/problems.ts reads this list, so a code is described here and nowhere else.
 */
export const domainCodes = {
  'missing-field': {
    title: 'A field is missing',
    text: 'The case cannot be solved without this field. Fields that change the answer by a large factor have no default.',
  },
  'unknown-field': {
    title: 'A field is not known',
    text: 'The case has no field of this name. Unknown fields are refused, so that a misspelt one is never ignored.',
  },
  'wrong-type': {
    title: 'A value has the wrong type',
    text: 'The value is not of the kind the field takes, for instance a text where a number is expected.',
  },
  'out-of-range': {
    title: 'A number is outside its range',
    text: 'Every quantity has a range within which the stated accuracy is tested. Numbers outside it are refused.',
  },
  'not-in-list': {
    title: 'A value is not one of those offered',
    text: 'The field takes one of a closed list of values.',
  },
  'wrong-length': {
    title: 'A text or list is too short or too long',
    text: 'Lists and texts are bounded, so that every call has a known largest cost.',
  },
  'wrong-form': {
    title: 'A text is not of the required form',
    text: 'The text does not match the form that the field takes.',
  },
  'conflicting-fields': {
    title: 'Fields exclude each other',
    text: 'The same property was given in two ways, or two fields were given that cannot stand together. Neither is preferred silently, consistent or not.',
  },
  'unit-not-accepted': {
    title: 'A unit is not accepted here',
    text: 'Each quantity takes the UCUM codes listed for it. A scale with a zero of its own (Cel, [degF]) stands alone, never in a product, and a difference of temperatures takes K or [degR]. Nothing is converted by a guess.',
  },
  'material-unknown': {
    title: 'There is no such material',
    text: 'The id names no material of the catalogue and none that this call can use. Materials of an account are known only where a key says which account it is.',
  },
  'depth-outside-body': {
    title: 'A depth lies outside the body',
    text: 'The body ends before this depth, so there is no temperature to give. Nothing is moved to the edge.',
  },
  'sizes-do-not-fit': {
    title: 'Two sizes do not fit each other',
    text: 'Each size is in its range, but together they make no body that the case can solve.',
  },
  'output-not-defined': {
    title: 'The case has no such output',
    text: 'An output that a case lacks, or that does not exist for the given input, is refused and never answered as null.',
  },
  'target-at-asymptote': {
    title: 'The target is where the value ends',
    text: 'The value tends to the target and comes nearer to it for ever, so no time can be told at which it is reached. Ask for a target that differs from the end by what matters to you.',
  },
  'no-rate-at-change': {
    title: 'There is no rate at this time',
    text: 'A temperature has one rate before a change of what drives it and another after it, and no one sensitivity to a duration that ends there. Ask for a time to either side.',
  },
  'singular-at-time-zero': {
    title: 'The output diverges at time zero',
    text: 'The requested output has no finite limit as time goes to zero. Ask for a time after the change.',
  },
} as const

export type DomainCode = keyof typeof domainCodes

export interface Issue {
  /** RFC 6901 pointer with a leading `#`, for instance `#/times/3`. */
  pointer: string
  code: DomainCode
  detail: string
  /** What would be accepted in its place. */
  accepted?: string
}

/** More issues than this are counted, not listed. */
export const MAX_ISSUES = 50

/** Input that a solver refuses: every issue found, each naming its field. */
export class DomainError extends Error {
  readonly issues: readonly Issue[]
  constructor(issues: readonly Issue[]) {
    super(issues[0]?.detail ?? 'The input is refused.')
    this.name = 'DomainError'
    this.issues = issues.slice(0, MAX_ISSUES)
  }
}

export function pointerOf(path: readonly PropertyKey[]): string {
  return '#' + path.map((part) => '/' + String(part).replaceAll('~', '~0').replaceAll('/', '~1')).join('')
}
