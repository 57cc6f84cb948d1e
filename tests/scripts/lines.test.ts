import fc from 'fast-check'
import { expect, test } from 'vitest'
import { type Line, linesOf } from '../../scripts/lines.ts'

async function* bytes(...chunks: (string | Uint8Array)[]) {
  for (const chunk of chunks) yield typeof chunk === 'string' ? Buffer.from(chunk) : chunk
}

async function all(lines: AsyncGenerator<Line>) {
  const found: Line[] = []
  for await (const line of lines) found.push(line)
  return found
}

test('lines come out the same wherever the stream is cut, and whether or not the last one ends', async () => {
  const text = fc.array(
    fc.string({ unit: 'grapheme', minLength: 1 }).filter((s) => s.trim() !== '' && !/[\n\uFEFF]/.test(s)),
  )
  await fc.assert(
    fc.asyncProperty(text, fc.integer({ min: 1, max: 7 }), fc.boolean(), async (lines, size, ended) => {
      const whole = Buffer.from(lines.join('\n') + (ended && lines.length > 0 ? '\n' : ''))
      const cuts = Array.from({ length: Math.ceil(whole.length / size) }, (_, n) =>
        whole.subarray(n * size, n * size + size),
      )
      expect(await all(linesOf(bytes(...cuts), 10_000))).toEqual(lines.map((line) => ({ text: line })))
    }),
    { seed: Number(process.env['SOAKSTONE_SEED'] || 1) },
  )
})

test('blank lines and carriage returns say nothing', async () => {
  expect(await all(linesOf(bytes('\n\r\n  \na\r\n\n'), 10))).toEqual([{ text: 'a\r' }])
})

test('a line beyond the limit is named and dropped; the next one is read', async () => {
  const found = await all(linesOf(bytes('12345\n123', '456', '789\nab'), 5))
  expect(found).toEqual([{ text: '12345' }, { fault: 'too-long' }, { text: 'ab' }])
})

test('bytes that are no UTF-8 are named', async () => {
  expect(await all(linesOf(bytes(new Uint8Array([0xff, 0x0a])), 5))).toEqual([{ fault: 'not-utf-8' }])
})
