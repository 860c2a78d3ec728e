import { readFileSync } from 'node:fs';

export interface Tally {
  passed: number;
  failed: number;
  skipped: number;
}

export const nothing: Tally = { passed: 0, failed: 0, skipped: 0 };

export function sum(tallies: readonly Tally[]): Tally {
  return tallies.reduce(
    (total, one) => ({
      passed: total.passed + one.passed,
      failed: total.failed + one.failed,
      skipped: total.skipped + one.skipped,
    }),
    nothing,
  );
}

/** A step that is one check: it passed or it did not. */
export function single(ok: boolean): Tally {
  return ok ? { passed: 1, failed: 0, skipped: 0 } : { passed: 0, failed: 1, skipped: 0 };
}

interface JestResult {
  success: boolean;
  numPassedTests: number;
  numFailedTests: number;
  numPendingTests: number;
  numTodoTests: number;
  numRuntimeErrorTestSuites: number;
}

/** A spec file that could not even be loaded has no failed test, but has failed. */
export function ofJest(result: JestResult, exitedWell: boolean): Tally {
  const failed = result.numFailedTests + result.numRuntimeErrorTestSuites;
  return {
    passed: result.numPassedTests,
    failed: failed === 0 && !(result.success && exitedWell) ? 1 : failed,
    skipped: result.numPendingTests + result.numTodoTests,
  };
}

interface PlaywrightResult {
  stats: { expected: number; unexpected: number; flaky: number; skipped: number };
  errors: unknown[];
}

/** A test that needed a second try has failed once: it counts as failed. */
export function ofPlaywright(result: PlaywrightResult, exitedWell: boolean): Tally {
  const { expected, unexpected, flaky, skipped } = result.stats;
  const failed = unexpected + flaky + result.errors.length;
  return { passed: expected, failed: failed === 0 && !exitedWell ? 1 : failed, skipped };
}

export function readResult<T>(file: string): T | undefined {
  try {
    return JSON.parse(readFileSync(file, 'utf8')) as T;
  } catch {
    return undefined;
  }
}

export function lastLine({ passed, failed }: Tally): string {
  return `${passed} passed, ${failed} failed`;
}

export function exitCode({ failed, skipped }: Tally): number {
  return failed + skipped > 0 ? 1 : 0;
}
