import type { Case } from '../../solvers/case.ts'
import { cases } from '../../solvers/cases/index.ts'
import { withOwnMaterials } from '../../solvers/materials/own-material.ts'
import { type Call, type CaseOperation, caseOperations, operationsOf } from '../../solvers/operations/index.ts'
import { caseOperationPath } from '../catalogue/describe.ts'
import { parseJson } from '../http/json.ts'
import { type Body, type OwnMaterials, operation } from '../operation.ts'
import { Problem } from '../problems.ts'
import { BODY_LIMIT, MAX_POINTS, MAX_TRY_VALUES, TRY_BODY_LIMIT } from './limits.ts'
import { solveMetered } from './solve-metered.ts'
import { answerOf, inputOf } from './schemas.ts'

/** A validated call with the body it came from, as a value or, where it is long, as bytes: a thread reads it again. */
export interface PreparedCall {
  call: Call
  raw: unknown
  /** Materials of the account that the body names. */
  own: OwnMaterials
}

const bodyOf = (c: Case, o: CaseOperation, limit: number): Body<PreparedCall> => ({
  schema: inputOf(c, o),
  limit,
  materials: true,
  parse: (raw, own) => ({ call: o.prepare(c, withOwnMaterials(raw, own), 'full'), raw, own }),
  async parseLong(bytes, { compute }, own) {
    const priced = await compute.prepare({ case: c.id, operation: o.id, bytes, own })
    const run = () => o.prepare(c, withOwnMaterials(parseJson(bytes), own), 'full').run()
    return { call: { ...priced, run }, raw: bytes, own }
  },
})

function withKey(c: Case, o: CaseOperation) {
  const free = o.price(c) === 'free'
  return operation({
    id: `${o.id}-${c.id}`,
    document: 'openapi',
    method: 'post',
    path: caseOperationPath(c.id, o.id),
    tag: 'Cases',
    summary: `${c.title}: ${o.title.toLowerCase()}`,
    description: `${o.summary}\n\n${c.summary}${notesOf(c, o)}\n\nPrice: ${o.price(c)}.`,
    access: 'key',
    scope: 'solve',
    metered: !free,
    body: bodyOf(c, o, BODY_LIMIT),
    status: 200,
    answer: answerOf(c, o),
    example: { body: o.example(c) },
    caseId: c.id,
    caseOperation: o.id,
    handle({ body, caller, call, deps }) {
      if (free) return deps.compute.solve({ case: c.id, operation: o.id, ...body })
      if (body.call.points > MAX_POINTS)
        throw new Problem(
          'too-many-points',
          `The call needs ${body.call.points} points; one call may need ${MAX_POINTS}.`,
        )
      return solveMetered({ case: c.id, operation: o.id, ...body }, caller, call, deps)
    },
  })
}

function withoutKey(c: Case, o: CaseOperation) {
  return operation({
    id: `try-${o.id}-${c.id}`,
    document: 'portal',
    method: 'post',
    path: `/portal/v1/try/${c.id}/${o.id}`,
    tag: 'Try',
    summary: `${c.title}: ${o.title.toLowerCase()} without a key`,
    description: `The same answer as with a key, for at most ${MAX_TRY_VALUES} numbers. Unmetered and limited per address.`,
    access: 'public',
    limiter: 'try',
    body: bodyOf(c, o, TRY_BODY_LIMIT),
    status: 200,
    answer: answerOf(c, o),
    problems: ['too-many-values', 'solve-too-slow'],
    example: { body: o.example(c) },
    caseId: c.id,
    caseOperation: o.id,
    handle({ body, deps }) {
      if (body.call.size > MAX_TRY_VALUES)
        throw new Problem(
          'too-many-values',
          `The call asks for ${body.call.size} numbers; ${MAX_TRY_VALUES} are answered without a key.`,
        )
      return deps.compute.solve({ case: c.id, operation: o.id, ...body })
    },
  })
}

/** What the case is for and where it stops is told once, where it is solved. */
const notesOf = (c: Case, o: CaseOperation) => (o === caseOperations[0] ? `\n\n${c.notes}` : '')

const each = (make: typeof withKey) => cases.flatMap((c) => operationsOf(c).map((o) => make(c, o)))

export const caseOperationList = each(withKey)
export const tryOperations = each(withoutKey)
