import { answerLine, count, type LineAnswer, refusedLine } from '../api/batches/lines.ts'
import { BODY_LIMIT } from '../api/cases/limits.ts'
import { Problem } from '../api/problems.ts'
import { type Line, linesOf } from './lines.ts'

/** Answers a stream of lines, one for one and in order; the last line sums up, and a stream without it was cut. */
export async function* solveLines(input: AsyncIterable<Uint8Array>, publicUrl: string): AsyncGenerator<string> {
  const summary = { ok: 0, failed: 0, points: 0 }
  for await (const line of linesOf(input, BODY_LIMIT)) {
    const answered = answerOne(line, publicUrl)
    count(summary, answered)
    yield JSON.stringify(answered)
  }
  yield JSON.stringify({ summary })
}

function answerOne(line: Line, publicUrl: string): LineAnswer {
  if ('text' in line) return answerLine(line.text, { own: new Map(), publicUrl }, console.error)
  const problem =
    line.fault === 'too-long' ? new Problem('body-too-large') : new Problem('malformed-json', 'The line is not UTF-8.')
  return refusedLine(null, problem, publicUrl)
}
