/**
 * Counts a vitest JSON report. A test that was left out counts as failed, for nothing here may be skipped; so does a
 * file that failed outside its tests, and a run that failed without saying where.
 * @param {any} report what vitest wrote, or null when it wrote nothing
 * @param {number} exitCode of vitest
 * @returns {{ passed: number, failed: number }}
 */
export function countReport(report, exitCode) {
  if (report === null || !Array.isArray(report.testResults)) return { passed: 0, failed: 1 };
  let passed = 0;
  let failed = 0;
  for (const file of report.testResults) {
    const results = file.assertionResults ?? [];
    const good = results.filter((one) => one.status === "passed").length;
    passed += good;
    failed += results.length - good;
    // Such as a file that cannot be loaded, or one with no test in it.
    if (good === results.length && (file.status !== "passed" || results.length === 0)) failed += 1;
  }
  if (failed === 0 && (exitCode !== 0 || passed === 0)) failed += 1;
  return { passed, failed };
}

/**
 * Adds up counts.
 * @param {readonly { passed: number, failed: number }[]} counts
 */
export function addCounts(counts) {
  const passed = counts.reduce((sum, one) => sum + one.passed, 0);
  const failed = counts.reduce((sum, one) => sum + one.failed, 0);
  return { passed, failed };
}

/**
 * The last line of a test run.
 * @param {{ passed: number, failed: number }} count
 */
export function summaryLine({ passed, failed }) {
  return `${passed} passed, ${failed} failed`;
}
