/** @typedef {{ passed: number, failed: number, skipped: number }} Counts */

/** @type {Counts} */
export const noTests = { passed: 0, failed: 0, skipped: 0 }

/** One check that has only a yes or a no. @param {boolean} isPassed @returns {Counts} */
export const oneCheck = isPassed => isPassed ? { passed: 1, failed: 0, skipped: 0 } : { passed: 0, failed: 1, skipped: 0 }

/** @param {Counts[]} counts @returns {Counts} */
export function addCounts(counts) {
  return counts.reduce((sum, { passed, failed, skipped }) => ({ passed: sum.passed + passed, failed: sum.failed + failed, skipped: sum.skipped + skipped }), noTests)
}

/**
 * From vitest's JSON report. A file that could not be loaded, a run that ended badly with no failed test to show for it,
 * and a run without any test each count as one failure.
 * @param {{ numPassedTests: number, numFailedTests: number, numPendingTests: number, numTodoTests?: number,
 *   testResults: { status: string, assertionResults: { status: string }[] }[] } | undefined} report
 * @param {number} exitCode
 * @returns {Counts}
 */
export function countVitest(report, exitCode) {
  if (!report) return oneCheck(false)
  const unloaded = report.testResults.filter(file => file.status === 'failed' && !file.assertionResults.some(test => test.status === 'failed')).length
  const counts = {
    passed: report.numPassedTests,
    failed: report.numFailedTests + unloaded,
    skipped: report.numPendingTests + (report.numTodoTests ?? 0),
  }
  const isUnexplained = counts.failed === 0 && (exitCode !== 0 || counts.passed === 0)
  return isUnexplained ? { ...counts, failed: 1 } : counts
}

/** The last line of a run, and whether the run is good. @param {Counts} counts */
export function summarize({ passed, failed, skipped }) {
  return { line: `tests: ${passed} passed, ${failed} failed, ${skipped} skipped`, isGood: failed === 0 && passed > 0 }
}
