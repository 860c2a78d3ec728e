import { exitCode, lastLine, ofJest, ofPlaywright, single, sum } from './tally';

const clean = {
  success: true,
  numPassedTests: 3,
  numFailedTests: 0,
  numPendingTests: 0,
  numTodoTests: 0,
  numRuntimeErrorTestSuites: 0,
};
const played = { stats: { expected: 2, unexpected: 0, flaky: 0, skipped: 0 }, errors: [] };

describe('counting a test run', () => {
  it('adds up what each tool reports', () => {
    const total = sum([single(true), ofJest(clean, true), ofPlaywright(played, true)]);
    expect(lastLine(total)).toBe('6 passed, 0 failed');
    expect(exitCode(total)).toBe(0);
  });

  it('counts a spec that does not load, a bad end and a second try as failures', () => {
    const broken = { ...clean, success: false, numRuntimeErrorTestSuites: 1 };
    expect(ofJest(broken, false).failed).toBe(1);
    expect(ofJest(clean, false).failed).toBe(1);
    expect(ofPlaywright({ ...played, stats: { ...played.stats, flaky: 1 } }, true).failed).toBe(1);
    expect(ofPlaywright(played, false).failed).toBe(1);
    expect(single(false).failed).toBe(1);
  });

  it('does not let a skipped test pass as a good run', () => {
    const skipping = ofJest({ ...clean, numPendingTests: 1 }, true);
    expect(skipping).toEqual({ passed: 3, failed: 0, skipped: 1 });
    expect(exitCode(skipping)).toBe(1);
  });
});
