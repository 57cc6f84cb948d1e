import { expect, test } from 'vitest'
import { closingLine, tallyOf } from '../../scripts/tally.mjs'

const file = (status: string, ...tests: string[]) => ({
  status,
  name: 'a.test.ts',
  assertionResults: tests.map((each) => ({ status: each })),
})

test.each([
  ['all passed', [file('passed', 'passed', 'passed')], true, 0, { passed: 2, failed: 0 }],
  ['one failed', [file('failed', 'passed', 'failed')], false, 1, { passed: 1, failed: 1 }],
  ['a skipped test is no passed one', [file('passed', 'passed', 'pending')], true, 0, { passed: 1, failed: 1 }],
  ['a file that cannot be read', [file('failed'), file('passed', 'passed')], false, 1, { passed: 1, failed: 1 }],
  ['an error outside any test', [file('passed', 'passed')], true, 1, { passed: 1, failed: 1 }],
])('%s', (_, testResults, success, code, tally) => {
  expect(tallyOf({ success, testResults }, code)).toEqual(tally)
})

test('the closing line adds up, and a run without a passed test has failed', () => {
  expect(
    closingLine([
      { passed: 3, failed: 0 },
      { passed: 4, failed: 0 },
    ]),
  ).toEqual({ line: '7 passed, 0 failed', code: 0 })
  expect(closingLine([{ passed: 3, failed: 1 }])).toEqual({ line: '3 passed, 1 failed', code: 1 })
  expect(closingLine([])).toEqual({ line: '0 passed, 0 failed', code: 1 })
})
