/** What the test programs wrote about themselves, as counts. */
import fs from 'node:fs';

function read(file) {
  try {
    return JSON.parse(fs.readFileSync(file, 'utf8'));
  } catch {
    return null;
  }
}

/** A report that is missing, or tells of no test at all, is one failure: silence is never success. */
function settle({ passed, failed }, status) {
  if (passed + failed === 0) return { passed: 0, failed: 1 };
  // The program saw something go wrong outside every test.
  return { passed, failed: status !== 0 && failed === 0 ? 1 : failed };
}

/**
 * @param file   JSON report of vitest
 * @param status exit status of vitest
 */
export function countVitest(file, status) {
  const report = read(file);
  const files = report?.testResults ?? [];
  // A file that cannot be loaded has no tests to count, and is one failure.
  const broken = files.filter((one) => one.status === 'failed' && one.assertionResults.length === 0).length;
  const tests = files.flatMap((one) => one.assertionResults);
  const passed = tests.filter((one) => one.status === 'passed').length;
  return settle({ passed, failed: tests.length - passed + broken }, status);
}

/**
 * A story that holds on its second try counts as passed; the list names it as flaky.
 * @param file   JSON report of Playwright
 * @param status exit status of Playwright
 */
export function countPlaywright(file, status) {
  const { expected = 0, unexpected = 0, flaky = 0, skipped = 0 } = read(file)?.stats ?? {};
  return settle({ passed: expected + flaky, failed: unexpected + skipped }, status);
}
