import { expect, test } from 'vitest';
import { countPlaywright, countVitest, settleCounts } from '../../../server/dev/test-counts.mjs';

test('a file that cannot be loaded counts as a failure', () => {
  const report = {
    numPassedTests: 3,
    numFailedTests: 1,
    numPendingTests: 1,
    numTodoTests: 1,
    testResults: [
      { status: 'passed', assertionResults: [{}, {}, {}] },
      { status: 'failed', assertionResults: [{}] },
      { status: 'failed', assertionResults: [] },
    ],
  };
  expect(countVitest(report)).toEqual({ passed: 3, failed: 2, skipped: 2 });
});

test('a browser test that passed only at the second try counts as a failure', () => {
  const report = { stats: { expected: 4, unexpected: 1, flaky: 1, skipped: 2 } };
  expect(countPlaywright(report)).toEqual({ passed: 4, failed: 2, skipped: 2 });
});

test('no failure of a runner gets lost', () => {
  expect(settleCounts(null, 0)).toEqual({ passed: 0, failed: 0, skipped: 0 });
  expect(settleCounts(null, 127)).toEqual({ passed: 0, failed: 1, skipped: 0 });
  const passed = { passed: 5, failed: 0, skipped: 0 };
  expect(settleCounts(passed, 1)).toEqual({ passed: 5, failed: 1, skipped: 0 });
  const failed = { passed: 5, failed: 2, skipped: 0 };
  expect(settleCounts(failed, 1)).toEqual(failed);
});
