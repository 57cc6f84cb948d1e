/** @typedef {{passed: number, failed: number}} Tally */

/**
 * The closing line of a test run, and its exit code: a run that passed nothing has failed.
 * @param {readonly Tally[]} tallies
 */
export function closingLine(tallies) {
  const passed = tallies.reduce((sum, tally) => sum + tally.passed, 0)
  const failed = tallies.reduce((sum, tally) => sum + tally.failed, 0)
  return { line: `${passed} passed, ${failed} failed`, code: failed > 0 || passed === 0 ? 1 : 0 }
}

/**
 * @typedef {object} Report what vitest writes
 * @property {boolean} success
 * @property {{status: string, name: string, assertionResults: {status: string}[]}[]} testResults
 */

/**
 * Counts a vitest report. A skipped test counts as failed, and so does a file that could not be read or an error outside any test.
 * @param {Report} report
 * @param {number} code exit code of vitest
 * @returns {Tally}
 */
export function tallyOf(report, code) {
  const tests = report.testResults.flatMap((file) => file.assertionResults)
  const passed = tests.filter(({ status }) => status === 'passed').length
  const brokenFiles = report.testResults.filter(
    (file) => file.status === 'failed' && file.assertionResults.every(({ status }) => status === 'passed'),
  ).length
  const failed = tests.length - passed + brokenFiles
  return { passed, failed: failed === 0 && (code !== 0 || !report.success) ? 1 : failed }
}
