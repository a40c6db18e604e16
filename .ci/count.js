// Prints `N passed, M failed` from the test runner's JSON report; exits 1 unless tests ran and all of them passed.
import { readFileSync } from 'node:fs';

/** A file that fails to load counts as one failure: it has no tests of its own to count. */
function count(report) {
  const broken = report.testResults.filter(
    (file) => file.status === 'failed' && file.assertionResults.length === 0,
  );
  return { passed: report.numPassedTests, failed: report.numFailedTests + broken.length };
}

let result = { passed: 0, failed: 0 };
try {
  result = count(JSON.parse(readFileSync(process.argv[2], 'utf8')));
} catch (error) {
  console.error(`No test report: ${error.message}`);
}
console.log(`${result.passed} passed, ${result.failed} failed`);
process.exitCode = result.passed > 0 && result.failed === 0 ? 0 : 1;
