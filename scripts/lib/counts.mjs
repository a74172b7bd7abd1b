/**
 * Passed and failed tests of a Vitest JSON report. A file that could not be loaded counts as one failure,
 * and so does a test that was skipped: a test that does not run proves nothing.
 */
export function countVitest(report) {
  if (!report) return { passed: 0, failed: 1 };
  const unloaded = report.testResults.filter(
    ({ status, assertionResults }) => status === "failed" && assertionResults.length === 0,
  ).length;
  const skipped = (report.numPendingTests ?? 0) + (report.numTodoTests ?? 0);
  return { passed: report.numPassedTests, failed: report.numFailedTests + unloaded + skipped };
}

/** Passed and failed tests of a Playwright JSON report; skipped and flaky ones and errors outside of tests are failures. */
export function countPlaywright(report) {
  if (!report) return { passed: 0, failed: 1 };
  const { expected, unexpected, flaky, skipped } = report.stats;
  return { passed: expected, failed: unexpected + flaky + skipped + (report.errors?.length ?? 0) };
}

/** The sum of all steps; a step that ended badly without a counted failure still counts as one. */
export function total(results) {
  return results.reduce(
    (sum, { passed, failed }) => ({ passed: sum.passed + passed, failed: sum.failed + failed }),
    { passed: 0, failed: 0 },
  );
}
