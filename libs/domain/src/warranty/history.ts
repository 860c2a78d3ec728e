import { daysBetween } from '../calendar/trade-day';
import { type EarlierJob, type FittedPart, type RulingContext, type WarrantyRules } from './case';

/** A job of the machine's past, and how long before the present work it was signed off. */
export interface PastJob {
  job: EarlierJob;
  daysAgo: number;
}

export interface PastPart extends PastJob {
  part: FittedPart;
}

/** Signed-off jobs on the same machine, the latest first. */
function pastJobs({ job, earlierJobs }: RulingContext): PastJob[] {
  return earlierJobs
    .filter((earlier) => earlier.machineId === job.machineId && earlier.jobId !== job.jobId)
    .map((earlier) => ({ job: earlier, daysAgo: daysBetween(earlier.signedOffOn, job.on) }))
    .filter(({ daysAgo }) => daysAgo >= 0)
    .sort((a, b) => a.daysAgo - b.daysAgo);
}

/** The latest job that put right what failed now. */
export function lastRepairOf(context: RulingContext): PastJob | undefined {
  const { component } = context.job;
  if (component === null) return undefined;
  return pastJobs(context).find(
    ({ job }) =>
      job.component === component && (job.result === 'put_right' || job.result === 'replaced'),
  );
}

/**
 * The part that failed: the latest one fitted that is the same article as the one fitted now, or of
 * the same category. Without a part fitted now, one of the category that failed.
 */
export function failedPart(
  context: RulingContext,
  fittedNow: { partId: string | null; category: string | null } | null | undefined,
): PastPart | undefined {
  const category = fittedNow ? fittedNow.category : context.job.component;
  for (const past of pastJobs(context)) {
    const part = past.job.parts.find(
      (each) =>
        (each.partId !== null && each.partId === fittedNow?.partId) ||
        (each.category !== null && each.category === category),
    );
    if (part) return { ...past, part };
  }
  return undefined;
}

/** The latest job for the same reported symptom. */
export function lastSameSymptom(context: RulingContext): PastJob | undefined {
  const { symptom } = context.job;
  if (symptom === null) return undefined;
  return pastJobs(context).find(({ job }) => job.symptom === symptom);
}

export function partDaysFor(rules: WarrantyRules, category: string | null): number {
  const own = category === null ? undefined : rules.partDaysByCategory[category];
  return own ?? rules.partDays;
}
