import { countReport, type JestReport } from './jest-project';

const clean: JestReport = {
  numPassedTests: 7,
  numFailedTests: 0,
  numPendingTests: 0,
  numTodoTests: 0,
  numRuntimeErrorTestSuites: 0,
};

describe('countReport', () => {
  it('takes a clean report as it is', () => {
    expect(countReport(clean, 0)).toEqual({ passed: 7, failed: 0, skipped: 0 });
  });

  it('counts failed tests, files that broke, and tests that did not run', () => {
    const report = { ...clean, numFailedTests: 2, numRuntimeErrorTestSuites: 1, numPendingTests: 3, numTodoTests: 1 };
    expect(countReport(report, 1)).toEqual({ passed: 7, failed: 3, skipped: 4 });
  });

  it('never lets a bad ending pass for want of a failed test', () => {
    expect(countReport(clean, 1).failed).toBe(1);
    expect(countReport(undefined, 0)).toEqual({ passed: 0, failed: 1, skipped: 0 });
  });
});
