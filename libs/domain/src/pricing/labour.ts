import { addUp } from '../money/amount';
import { roundToStep } from '../money/rounding';
import { share } from '../money/share';
import { type Edition, type LabourRates } from './edition';
import { type JobToPrice } from './visit';

/** Minutes of one job as they are billed. */
export interface BilledMinutes {
  normal: number;
  afterHours: number;
}

/** The labour of a visit: what is billed for each job, and how it came about. */
export interface BilledLabour {
  jobs: BilledMinutes[];
  /** Minutes that count, before minimum and steps. */
  worked: number;
  /** What the minimum added. */
  toppedUp: number;
  /** Minutes billed in all. */
  billed: number;
}

/**
 * What labour is billed for a visit. The minimum and the steps are the visit's, not the machine's:
 * the shop comes once, however many machines wait.
 *
 * 1. The minutes of all jobs are added, normal and after hours apart. A machine with nothing found
 *    counts by the shop's rule: for at most the minimum, or not at all.
 * 2. If both together fall short of the minimum, the rest is added to the normal minutes, or, when
 *    all work was after hours, to those.
 * 3. Each of the two is rounded up to the next step.
 * 4. Each is shared over its jobs by the minutes worked, to whole minutes (largest remainder).
 *
 * Where only machines with nothing found were tested and no minutes noted, they share the minimum.
 */
export function billedLabour(edition: Edition, jobs: readonly JobToPrice[]): BilledLabour {
  const { labour } = edition;
  const counted = jobs.map((job) => countedMinutes(job, edition));
  const normal = addUp(counted.map((job) => job.normal));
  const afterHours = addUp(counted.map((job) => job.afterHours));
  const worked = addUp([normal, afterHours]);
  const untimedTests = jobs.map((job) => isBilledTest(job, edition));
  if (worked === 0 && !untimedTests.includes(true)) {
    return { jobs: counted, worked, toppedUp: 0, billed: 0 };
  }
  const toppedUp = Math.max(0, labour.minimumMinutes - worked);
  const toNormal = normal > 0 || afterHours === 0;
  const normalBilled = inSteps(normal + (toNormal ? toppedUp : 0), labour);
  const afterHoursBilled = inSteps(afterHours + (toNormal ? 0 : toppedUp), labour);
  const normalShares = sharedBy(
    normalBilled,
    worked === 0 ? untimedTests.map(Number) : counted.map((job) => job.normal),
  );
  const afterHoursShares = sharedBy(
    afterHoursBilled,
    counted.map((job) => job.afterHours),
  );
  return {
    jobs: jobs.map((_, i) => ({
      normal: normalShares[i] ?? 0,
      afterHours: afterHoursShares[i] ?? 0,
    })),
    worked,
    toppedUp,
    billed: addUp([normalBilled, afterHoursBilled]),
  };
}

function countedMinutes(job: JobToPrice, edition: Edition): BilledMinutes {
  if (job.result !== 'nothing_found') {
    return { normal: job.minutes, afterHours: job.afterHoursMinutes };
  }
  if (!isBilledTest(job, edition)) return { normal: 0, afterHours: 0 };
  const normal = Math.min(job.minutes, edition.labour.minimumMinutes);
  const left = edition.labour.minimumMinutes - normal;
  return { normal, afterHours: Math.min(job.afterHoursMinutes, left) };
}

function isBilledTest(job: JobToPrice, edition: Edition): boolean {
  return job.result === 'nothing_found' && edition.nothingFound === 'bill_minimum';
}

function inSteps(minutes: number, labour: LabourRates): number {
  return roundToStep(minutes, 1, labour.incrementMinutes, 'up');
}

function sharedBy(total: number, weights: readonly number[]): number[] {
  return total === 0 ? weights.map(() => 0) : share(total, weights);
}
