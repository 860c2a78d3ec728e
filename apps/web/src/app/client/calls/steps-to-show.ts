import { type Call } from './calls-api';

type Step = Call['progress'][number];

/**
 * The steps a call has come by and those still ahead. One that was passed over, as when a tech was
 * near by and came without a plan, is left out: it will not happen any more.
 */
export function stepsToShow(progress: readonly Step[]): (Step & { latest: boolean })[] {
  const last = progress.findLastIndex(({ at }) => at !== null);
  return progress
    .map((step, index) => ({ ...step, latest: index === last }))
    .filter(({ at }, index) => at !== null || index > last);
}
