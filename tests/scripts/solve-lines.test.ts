import { expect, test } from 'vitest'
import { BODY_LIMIT } from '../../api/cases/limits.ts'
import { solveLines } from '../../scripts/solve-lines.ts'
import { cases } from '../../solvers/cases/index.ts'
import { solve } from '../../solvers/operations/solve.ts'

const PUBLIC_URL = 'https://api.example.org'
const [first = {} as never] = cases
const good = { id: 'r1', case: first.id, operation: 'solve', input: first.example }

interface Answered {
  id?: string | null
  status?: number
  points?: number
  answer?: object
  problem?: { status: number }
  summary?: object
}

async function answers(...lines: (string | object)[]): Promise<Answered[]> {
  const text = lines.map((line) => (typeof line === 'string' ? line : JSON.stringify(line))).join('\n')
  const found: Answered[] = []
  const input = (async function* () {
    yield Buffer.from(text)
  })()
  for await (const line of solveLines(input, PUBLIC_URL)) found.push(JSON.parse(line) as Answered)
  return found
}

test.each(cases.map((c) => [c.id, c] as const))(
  '%s: a line answers compact, in the numbers of a single call',
  async (_, c) => {
    const call = solve.prepare(c, c.example, 'compact')
    const [line, last] = await answers({ id: 'a', case: c.id, operation: 'solve', input: c.example })
    expect(line).toEqual({
      id: 'a',
      status: 200,
      points: call.points,
      answer: JSON.parse(JSON.stringify(call.run())) as object,
    })
    expect(Object.keys(line?.answer ?? {})).toEqual(['result', 'accuracy', 'warnings'])
    expect(last).toEqual({ summary: { ok: 1, failed: 0, points: call.points } })
  },
)

test('a line may ask for the full answer, inside its input', async () => {
  const [line] = await answers({ ...good, input: { ...first.example, detail: 'full' } })
  expect(line?.answer).toMatchObject({ case: first.id, operation: 'solve', cautions: expect.any(Array) as unknown })
})

test('every line is answered once, in order, and the sum is right', async () => {
  const found = await answers(good, 'not json', '', { ...good, id: 'r3', input: {} }, { ...good, id: 'r4' })
  expect(found.map((line) => [line.id, line.status])).toEqual([
    ['r1', 200],
    [null, 400],
    ['r3', 422],
    ['r4', 200],
    [undefined, undefined],
  ])
  const points = solve.prepare(first, first.example, 'compact').points
  expect(found.at(-1)).toEqual({ summary: { ok: 2, failed: 2, points: 2 * points } })
})

test('no line at all is answered by the sum alone', async () => {
  expect(await answers('')).toEqual([{ summary: { ok: 0, failed: 0, points: 0 } }])
})

test.each([
  ['no JSON', '{"id":"x"', null, 'malformed-json'],
  ['a name twice', '{"id":"x","id":"y"}', null, 'duplicate-name'],
  ['too deep', `{"id":"x","input":${'['.repeat(40)}${']'.repeat(40)}}`, null, 'too-deep'],
  ['longer than a body', JSON.stringify({ id: 'x', pad: 'x'.repeat(BODY_LIMIT) }), null, 'body-too-large'],
  ['an unknown case', { ...good, case: 'no-such-case' }, 'r1', 'not-found'],
  ['an unknown operation', { ...good, operation: 'guess' }, 'r1', 'not-found'],
  ['an operation named like a member of every object', { ...good, operation: 'constructor' }, 'r1', 'not-found'],
  ['no id', { ...good, id: undefined }, null, 'invalid-input'],
  ['an id that is no text', { ...good, id: 7 }, null, 'invalid-input'],
  ['an unknown member', { ...good, note: 'hello' }, 'r1', 'invalid-input'],
  ['a list', '[1,2]', null, 'invalid-input'],
])('%s is refused by name', async (_, line, id, code) => {
  const [refused, last] = await answers(line)
  expect(refused).toMatchObject({ id, problem: { code, type: `${PUBLIC_URL}/problems/${code}` } })
  expect(refused?.status).toBe(refused?.problem?.status)
  expect(refused?.problem).not.toHaveProperty('requestId')
  expect(last).toMatchObject({ summary: { ok: 0, failed: 1 } })
})

test('the pointer of a refused input starts at the line', async () => {
  const [refused] = await answers({ ...good, input: { ...first.example, times: [1, -1] } })
  expect(refused).toMatchObject({
    status: 422,
    problem: { errors: [{ pointer: '#/input/times/1', code: 'out-of-range' }] },
  })
})

test('a line that needs more points than a call may have is refused before work', async () => {
  const times = Array.from({ length: 100_000 }, (_, n) => n + 1)
  const slab = cases.find(({ id }) => id === 'slab-convection')!
  const input = { ...slab.example, times, depths: [0, 0.1, 0.2] }
  const [refused] = await answers({ id: 'big', case: slab.id, operation: 'solve', input })
  expect(refused).toMatchObject({ id: 'big', status: 413, problem: { code: 'too-many-points' } })
})
