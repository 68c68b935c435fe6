// Turns vitest's report into the two numbers of the last line.

/**
 * @typedef {{ passed: number, failed: number, skipped: number }} Counts
 * @param {string} json the report, or '' when there is none
 * @param {number} exitCode
 * @returns {Counts}
 */
export function countTests(json, exitCode) {
  let report;
  try {
    report = JSON.parse(json);
  } catch {
    return { passed: 0, failed: 1, skipped: 0 };
  }
  const passed = report.numPassedTests;
  // A file that could not even be loaded holds no test: it counts as one failure.
  const brokenFiles = report.testResults.filter(
    (file) => file.status === 'failed' && !file.assertionResults.some((test) => test.status === 'failed'),
  ).length;
  const failed = report.numFailedTests + brokenFiles;
  const skipped = report.numPendingTests + report.numTodoTests;
  // Failures outside any test (an unhandled error, no test found) show in the exit code alone.
  if (failed === 0 && exitCode !== 0) return { passed, failed: 1, skipped };
  return { passed, failed, skipped };
}
