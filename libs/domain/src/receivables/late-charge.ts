import { type IsoDate, plainDate } from '../calendar/iso';
import { daysBetween } from '../calendar/trade-day';
import { exact, roundHalfUp } from '../money/rounding';

/** How days are counted for a late charge: as they are over 365, or months of 30 over 360. */
export type DayCount = 'actual_365' | '30_360';

/** A part of a year as an exact fraction. */
export interface YearFraction {
  days: number;
  daysInYear: 360 | 365;
}

/**
 * The part of a year between two dates, the first not counted.
 *
 * - `actual_365`: the days of the calendar over 365, also in a leap year (ISDA 2006, 4.16(d)).
 * - `30_360`: every month 30 days; a 31st at the start counts as the 30th, and at the end too when
 *   the start is a 30th or 31st; the end of February is not moved ("30/360", "bond basis",
 *   ISDA 2006, 4.16(f)).
 *
 * @throws RangeError when `to` is before `from`
 */
export function yearFraction(from: IsoDate, to: IsoDate, dayCount: DayCount): YearFraction {
  const actualDays = daysBetween(from, to);
  if (actualDays < 0) throw new RangeError(`${to} is before ${from}`);
  if (dayCount === 'actual_365') return { days: actualDays, daysInYear: 365 };
  const start = plainDate(from);
  const end = plainDate(to);
  const startDay = Math.min(start.day, 30);
  const endDay = startDay === 30 ? Math.min(end.day, 30) : end.day;
  const months = (end.year - start.year) * 12 + end.month - start.month;
  return { days: months * 30 + endDay - startDay, daysInYear: 360 };
}

export interface LateChargeInput {
  /** Overdue, minor units, zero or more. */
  principal: number;
  /** Yearly rate in basis points: 1800 is 18 %. */
  annualBasisPoints: number;
  /** Due date, or the day the last late charge ran to. */
  from: IsoDate;
  to: IsoDate;
  dayCount: DayCount;
}

/**
 * Simple interest on an overdue amount, rounded once to the minor unit (halves up).
 * What a shop may charge is a matter of its terms and of the law of the place.
 *
 * @returns minor units, zero or more
 * @throws RangeError for amounts or rates below zero or not whole, or a period that runs backwards
 */
export function lateCharge(input: LateChargeInput): number {
  const { principal, annualBasisPoints, from, to, dayCount } = input;
  if (principal < 0 || annualBasisPoints < 0) {
    throw new RangeError('A late charge needs a principal and a rate of zero or more');
  }
  const { days, daysInYear } = yearFraction(from, to, dayCount);
  const numerator = exact(principal) * exact(annualBasisPoints) * exact(days);
  return roundHalfUp(numerator, exact(10_000) * exact(daysInYear));
}
