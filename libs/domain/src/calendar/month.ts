import {
  type Instant,
  type IsoDate,
  type Month,
  instantText,
  plainDate,
  plainMonth,
  toInstant,
} from './iso';
import { startOfTradeDay } from './trade-day';

/** A month as the shop sees it: its days, and the half-open span of instants they cover. */
export interface MonthBounds {
  firstDay: IsoDate;
  lastDay: IsoDate;
  /** First instant of the month, included. */
  from: string;
  /** First instant of the next month, not included. */
  until: string;
}

/**
 * The month an instant falls in, in the shop's zone.
 *
 * @throws RangeError for an unknown zone or a malformed instant
 */
export function monthOf(instant: Instant, zone: string): Month {
  return toInstant(instant).toZonedDateTimeISO(zone).toPlainDate().toPlainYearMonth().toString();
}

/** The month of a trade day. */
export function monthOfDate(date: IsoDate): Month {
  return plainDate(date).toPlainYearMonth().toString();
}

/**
 * First and last trade day of a month, and the instants between which its work was done.
 * The span is 23 or 25 hours off a multiple of days where daylight time begins or ends in it.
 */
export function monthBounds(month: Month, zone: string): MonthBounds {
  const named = plainMonth(month);
  const firstDay = named.toPlainDate({ day: 1 });
  const next = named.add({ months: 1 }).toPlainDate({ day: 1 });
  return {
    firstDay: firstDay.toString(),
    lastDay: next.subtract({ days: 1 }).toString(),
    from: startOfTradeDay(firstDay.toString(), zone),
    until: startOfTradeDay(next.toString(), zone),
  };
}

export function previousMonth(month: Month): Month {
  return plainMonth(month).subtract({ months: 1 }).toString();
}

export function nextMonth(month: Month): Month {
  return plainMonth(month).add({ months: 1 }).toString();
}

/**
 * The instant at which the close of a month falls due: on the shop's statement day of the month
 * after, at a full hour on its wall clock. A day the next month lacks means its last day, so
 * that a shop closing on the 31st closes every month.
 *
 * @param statementDay day of the month, 1 to 31
 * @param hour full hour, 0 to 23
 * @throws RangeError outside these, and for an unknown zone
 */
export function statementDueAt(
  month: Month,
  statementDay: number,
  hour: number,
  zone: string,
): string {
  if (!Number.isInteger(statementDay) || statementDay < 1 || statementDay > 31) {
    throw new RangeError(`A statement day is 1 to 31, not ${statementDay}`);
  }
  if (!Number.isInteger(hour) || hour < 0 || hour > 23) {
    throw new RangeError(`An hour is 0 to 23, not ${hour}`);
  }
  const following = plainMonth(month).add({ months: 1 });
  const day = following.toPlainDate({ day: statementDay });
  const zoned = day.toZonedDateTime({ timeZone: zone, plainTime: { hour } });
  return instantText(zoned.toInstant());
}
