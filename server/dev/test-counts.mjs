/**
 * What the test runners' own reports say about how many tests there were.
 *
 * @typedef {{ passed: number, failed: number, skipped: number }} TestCounts
 */

/**
 * @param {{ numPassedTests: number, numFailedTests: number, numPendingTests: number,
 *   numTodoTests?: number, testResults: { status: string, assertionResults: unknown[] }[] }} report
 *   of Vitest's json reporter
 * @returns {TestCounts}
 */
export function countVitest(report) {
  // A file that cannot be loaded has no tests to count and still is a failure.
  const unloadable = report.testResults.filter(
    ({ status, assertionResults }) => status === 'failed' && assertionResults.length === 0,
  ).length;
  return {
    passed: report.numPassedTests,
    failed: report.numFailedTests + unloadable,
    skipped: report.numPendingTests + (report.numTodoTests ?? 0),
  };
}

/**
 * @param {{ stats: { expected: number, unexpected: number, flaky: number, skipped: number } }} report
 *   of Playwright's json reporter; a test that failed and then passed counts as failed
 * @returns {TestCounts}
 */
export function countPlaywright({ stats }) {
  return {
    passed: stats.expected,
    failed: stats.unexpected + stats.flaky,
    skipped: stats.skipped,
  };
}

/**
 * Counts of a step: a runner that reports a failure without a failed test, or no report at all,
 * failed once.
 *
 * @param {TestCounts | null} counts
 * @param {number} exitCode
 * @returns {TestCounts}
 */
export function settleCounts(counts, exitCode) {
  const known = counts ?? { passed: 0, failed: 0, skipped: 0 };
  return exitCode !== 0 && known.failed === 0 ? { ...known, failed: 1 } : known;
}
