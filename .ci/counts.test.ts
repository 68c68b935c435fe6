import { describe, expect, it } from 'vitest';
import { countTests } from './counts.mjs';

const file = (status: string, ...tests: string[]) => ({
  status,
  assertionResults: tests.map((at) => ({ status: at })),
});
const report = (passed: number, failed: number, testResults: object[], pending = 0) =>
  JSON.stringify({
    numPassedTests: passed,
    numFailedTests: failed,
    numPendingTests: pending,
    numTodoTests: 0,
    testResults,
  });

describe('the numbers of the last line', () => {
  it('are those of the report', () => {
    const json = report(2, 1, [file('failed', 'passed', 'failed'), file('passed', 'passed')], 3);
    expect(countTests(json, 1)).toEqual({ passed: 2, failed: 1, skipped: 3 });
  });

  it('count a file that could not be loaded', () => {
    expect(countTests(report(2, 0, [file('failed'), file('passed', 'passed', 'passed')]), 1)).toMatchObject({
      failed: 1,
    });
  });

  it('never call a run passed that ended badly', () => {
    expect(countTests(report(2, 0, [file('passed', 'passed', 'passed')]), 1)).toMatchObject({ failed: 1 });
    expect(countTests('', 0)).toMatchObject({ passed: 0, failed: 1 });
  });
});
