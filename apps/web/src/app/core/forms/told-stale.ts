import { type WritableSignal } from '@angular/core';
import { isProblem, type Problem } from '../api/problem';

/**
 * For `refused` of a submission that changes something: when somebody else changed it meanwhile, it
 * is loaded anew, and the person looks once more before saving again.
 */
export function toldStale(
  problem: Problem,
  thing: { reload(): unknown },
  notes: WritableSignal<readonly string[]>,
): boolean {
  if (!isProblem(problem, 'stale-version')) return false;
  thing.reload();
  notes.set([
    'Somebody changed this in the meantime. What you wrote is kept: look at it and save again.',
  ]);
  return true;
}
