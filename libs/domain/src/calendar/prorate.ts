import { multiplyDivide } from '../money/rounding';
import { share } from '../money/share';
import { type IsoDate } from './iso';
import { daysBetween } from './trade-day';

/** Dates from a first to a last, both included. */
export interface Period {
  from: IsoDate;
  to: IsoDate;
}

/** Calendar days, both ends included. @throws RangeError when the period ends before it starts */
export function daysIn({ from, to }: Period): number {
  const days = daysBetween(from, to) + 1;
  if (days < 1) throw new RangeError(`A period cannot end (${to}) before it starts (${from})`);
  return days;
}

/**
 * The part of a period's amount that falls on the days from `from` to `to`, both included, by
 * actual days, rounded once (halves away from zero). Days outside the period count for nothing.
 *
 * Parts rounded one by one need not add up to the whole: use `prorateParts` when all are charged.
 *
 * @param amount for the whole period, minor units
 * @example prorate(31000, march, '2026-03-20', '2026-03-31') // 12 of 31 days: 12000
 */
export function prorate(amount: number, period: Period, from: IsoDate, to: IsoDate): number {
  daysIn({ from, to });
  const first = from > period.from ? from : period.from;
  const last = to < period.to ? to : period.to;
  const days = first > last ? 0 : daysIn({ from: first, to: last });
  return multiplyDivide(amount, days, daysIn(period));
}

/**
 * Divides a period's amount over successive parts of it by their days, to the cent: the parts add
 * up to the amount, as when a contract passes to another store within a month.
 *
 * @param parts neighbours in order, covering the period from its first to its last day
 * @throws RangeError when the parts leave out a day or count one twice
 */
export function prorateParts(amount: number, period: Period, parts: readonly Period[]): number[] {
  const days = parts.map(daysIn);
  parts.forEach(({ from }, index) => {
    const before = parts[index - 1];
    const gap = before ? daysBetween(before.to, from) - 1 : daysBetween(period.from, from);
    if (gap !== 0) throw new RangeError(`The part from ${from} does not follow on`);
  });
  if (parts.at(-1)?.to !== period.to) throw new RangeError(`The parts do not end on ${period.to}`);
  return share(amount, days);
}
