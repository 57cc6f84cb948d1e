import { z } from 'zod'
import type { Case } from '../case.ts'
import type { Call, CaseOperation } from './index.ts'
import { once } from './once.ts'
import { chargeOf, FLOOR, MAX_POINTS } from './price.ts'
import { readBody } from './read-body.ts'
import { within } from './within.ts'

const answerSchema = z.strictObject({
  points: z.number().meta({ description: 'Priced points of the call.' }),
  weight: z.number().meta({ description: 'Priced points of one number of the case.' }),
  charge: z.number().meta({ description: 'Points that the call is charged: at least the floor, whole.' }),
  floor: z.number().meta({ description: 'The least that a call is charged.' }),
  synchronous: z.boolean().meta({ description: `Whether one call may answer it: at most ${MAX_POINTS} points.` }),
})

/** The price of a call to one of the operations given, validated whole and not computed. */
export function costOf(operations: readonly CaseOperation[]): CaseOperation {
  const inputSchema = once((c: Case) => {
    const ids = operations.filter((o) => o.applies(c)).map(({ id }) => id)
    return z.strictObject({
      operation: z
        .enum(ids)
        .default('solve')
        .meta({
          title: 'Operation',
          description: `Operation: ${ids.join(', ')}. Default solve.`,
          'x-accepted': ids.join(', '),
        }),
      input: z.record(z.string(), z.unknown()).meta({
        title: 'Input',
        description: 'Input: the body of that operation.',
        'x-accepted': 'the body of the operation',
      }),
    })
  })

  function prepare(c: Case, body: unknown, defaultDetail: 'full' | 'compact'): Call {
    const { operation, input } = readBody(inputSchema(c), body)
    const asked = operations.find(({ id }) => id === operation)!
    const { points } = within('#/input', () => asked.prepare(c, input, defaultDetail))
    const answer = {
      points,
      weight: c.weight,
      charge: chargeOf(points),
      floor: FLOOR,
      synchronous: points <= MAX_POINTS,
    }
    return { values: 1, size: 1, points: 0, run: () => answer }
  }

  return {
    id: 'cost',
    title: 'Cost',
    summary: 'What a call would cost, after validating it whole and without computing it.',
    applies: () => true,
    price: () => 'free',
    input: inputSchema,
    answer: () => answerSchema,
    example: (c) => ({ operation: 'solve', input: c.example }),
    prepare,
  }
}
