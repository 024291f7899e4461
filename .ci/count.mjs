// Adds up the JSON reports of the test runs and prints `N passed, N failed` as the last line.
// A file that failed as a whole (it did not load, or a hook broke) counts as one failure, so does a missing report.
import { existsSync, readFileSync } from 'node:fs';

let passed = 0;
let failed = 0;
let skipped = 0;
for (const path of process.argv.slice(2)) {
  if (!existsSync(path)) {
    console.log(`No report ${path}: that run broke before it ended`);
    failed += 1;
    continue;
  }
  const report = JSON.parse(readFileSync(path, 'utf8'));
  passed += report.numPassedTests;
  failed += report.numFailedTests;
  skipped += report.numPendingTests + report.numTodoTests;
  for (const file of report.testResults) {
    const whole = file.status === 'failed' && !file.assertionResults.some((test) => test.status === 'failed');
    if (whole) {
      console.log(`${file.name} failed as a whole: ${file.message}`);
      failed += 1;
    }
  }
}
if (skipped > 0) console.log(`${skipped} skipped`);
console.log(`${passed} passed, ${failed} failed`);
process.exit(failed === 0 && passed > 0 ? 0 : 1);
