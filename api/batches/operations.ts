import { DomainError } from '../../solvers/errors.ts'
import { MAX_POINTS, chargeOf } from '../../solvers/operations/price.ts'
import { cases } from '../../solvers/cases/index.ts'
import { BODY_LIMIT } from '../cases/limits.ts'
import { refuseGone } from '../cases/solve-metered.ts'
import type { Deps } from '../deps.ts'
import type { RecordedCall } from '../http/record.ts'
import { type OwnMaterials, operation } from '../operation.ts'
import { Problem } from '../problems.ts'
import { add, answerBatch, priceBatch } from './batch.ts'
import { type Counts, linesOf, type LineTask, MOST_LINES } from './lines.ts'

const exampleLines = (cases[0] ? [cases[0]] : []).flatMap((c) => [
  { id: 'r1', case: c.id, operation: 'solve', input: c.example },
  { id: 'r2', case: c.id, input: { ...c.example, outputs: ['temperature'] } },
])

export const runBatch = operation({
  id: 'runBatch',
  document: 'openapi',
  method: 'post',
  path: '/v1/batches',
  tag: 'Batches',
  summary: 'Many calls in one',
  description: [
    `Up to ${MOST_LINES} calls, one JSON object a line: {"id", "case", "operation", "input"}. operation is solve unless it is named; input is the body of that call, its detail compact unless it says full.`,
    'The answer has a line for each, in the same order: {"id", "status": 200, "points", "answer"}, or {"id", "status", "problem"} where the line was refused; the others are answered all the same. Its last line is {"summary": {"ok", "failed", "points"}}: an answer without it was cut.',
    `All lines are read and priced before anything is charged. They may need ${MAX_POINTS} points together and are charged once, at least 10 points; a line that is refused costs nothing, and what fails in a solver is refunded.`,
  ].join('\n\n'),
  access: 'key',
  scope: 'solve',
  metered: true,
  upload: {
    kind: 'application/x-ndjson',
    limit: BODY_LIMIT,
    description: 'Calls as JSON objects, one a line.',
    example: exampleLines.map((line) => `${JSON.stringify(line)}\n`).join(''),
    materials: true,
    parse: readBatch,
  },
  status: 200,
  answersLines: 'Answers as JSON objects, one a line, and a summary last.',
  async handle({ body, caller, call, deps }) {
    const batch: LineTask = { ...body, publicUrl: deps.config.publicUrl }
    const priced = await priceBatch(batch, deps.compute)
    if (priced.points > MAX_POINTS)
      throw new Problem('too-many-points', `The batch needs ${priced.points} points; one may need ${MAX_POINTS}.`)
    const points = call.replayed ? 0 : chargedFor(priced)
    const { requestId, reference } = call
    const { accountId, keyId } = caller
    refuseGone(call)
    call.limits = (
      await deps.meter.spend({
        requestId,
        accountId,
        keyId,
        points,
        open: points > 0,
        ...(reference ? { reference } : {}),
      })
    ).headers
    call.points = points
    return { headers: { 'Points-Charged': String(points) }, lines: answered(batch, points, call, deps) }
  },
})

function readBatch(text: string, own: OwnMaterials): Omit<LineTask, 'publicUrl'> {
  const lines = linesOf(text)
  const count = lines.length
  if (count > 0 && count <= MOST_LINES) return { lines, own }
  throw new DomainError([
    {
      pointer: '#',
      code: 'wrong-length',
      detail: `The batch has ${count} lines.`,
      accepted: `1 to ${MOST_LINES} lines`,
    },
  ])
}

/** A batch in which nothing is answered costs nothing. */
const chargedFor = ({ ok, points }: Counts): number => (ok === 0 ? 0 : chargeOf(points))

/**
 * The lines of the answer. Their charge is open until all are there; then it stands, less what failed. Who hangs up
 * meanwhile pays for the whole.
 */
async function* answered(batch: LineTask, charged: number, call: RecordedCall, deps: Deps): AsyncGenerator<string> {
  const { meter, log } = deps
  const { requestId } = call
  const sum: Counts = { ok: 0, failed: 0, points: 0 }
  let hungUp = charged > 0
  try {
    for await (const { text, faults, ...counts } of answerBatch(batch, deps.compute)) {
      add(sum, counts)
      for (const error of faults) log.error({ requestId, error }, 'a line of a batch failed')
      yield text
    }
    hungUp = false
  } catch (error) {
    hungUp = false
    await meter.refund(requestId)
    call.points = 0
    throw error
  } finally {
    if (hungUp) await meter.close(requestId)
  }
  call.points = Math.min(charged, chargedFor(sum))
  if (call.points < charged) await meter.refund(requestId, charged - call.points)
  else if (charged > 0) await meter.close(requestId)
  yield `${JSON.stringify({ summary: sum })}\n`
}
