// Adds up test reports and prints "N passed, N failed": node total.mjs report.json...
// A report that is missing or can't be read counts as one failure, as does a test file that could not be loaded.
import { readFileSync } from 'node:fs';

/** @param {string} file */
function counts(file) {
  try {
    const report = JSON.parse(readFileSync(file, 'utf8'));
    if (!Array.isArray(report.testResults)) return { passed: report.passed, failed: report.failed };
    const broken = report.testResults.filter((one) => one.status === 'failed' && !one.assertionResults.some(failing));
    const failed = report.numFailedTests + broken.length;
    // an error outside of any test (a promise that nobody awaited) fails the run but no test in it
    return { passed: report.numPassedTests, failed: report.success ? failed : Math.max(1, failed) };
  } catch (error) {
    console.error(`${file}: ${error.message}`);
    return { passed: 0, failed: 1 };
  }
}
const failing = (assertion) => assertion.status === 'failed';

const all = process.argv.slice(2).map(counts);
const passed = all.reduce((sum, one) => sum + one.passed, 0);
const failed = all.reduce((sum, one) => sum + one.failed, 0);
console.log(`${passed} passed, ${failed} failed`);
process.exit(failed === 0 && passed > 0 ? 0 : 1);
