import { type IsoDate } from '../calendar/iso';
import { daysBetween } from '../calendar/trade-day';
import { addUp } from '../money/amount';

/** How long past due: not at all, and by days. */
export type AgeingBucket = 'current' | 'days1To30' | 'days31To60' | 'days61To90' | 'over90';

/** What is open of a statement. */
export interface OpenItem {
  id: string;
  dueOn: IsoDate;
  /** Minor units still to be paid; below zero for a credit that is not used up. */
  open: number;
}

/** Open amounts by bucket, minor units. */
export interface Ageing extends Record<AgeingBucket, number> {
  /** Sum of the buckets. */
  total: number;
}

/** Days past due on a day: 0 on the due date itself and before. */
export function daysPastDue(dueOn: IsoDate, on: IsoDate): number {
  return Math.max(0, daysBetween(dueOn, on));
}

/** The bucket of an item due on one date, as seen on another. The due date itself is current. */
export function ageingBucket(dueOn: IsoDate, on: IsoDate): AgeingBucket {
  const days = daysPastDue(dueOn, on);
  if (days === 0) return 'current';
  if (days <= 30) return 'days1To30';
  if (days <= 60) return 'days31To60';
  return days <= 90 ? 'days61To90' : 'over90';
}

/**
 * Open amounts by days past due, as accountants print them: current, 1-30, 31-60, 61-90, over 90.
 *
 * @param on the trade day the question is asked on
 */
export function ageing(items: Iterable<OpenItem>, on: IsoDate): Ageing {
  const buckets = { current: 0, days1To30: 0, days31To60: 0, days61To90: 0, over90: 0 };
  for (const { dueOn, open } of items) {
    const bucket = ageingBucket(dueOn, on);
    buckets[bucket] = addUp([buckets[bucket], open]);
  }
  return { ...buckets, total: addUp(Object.values(buckets)) };
}
