import { Temporal } from 'temporal-polyfill';
import {
  type Instant,
  type IsoDate,
  type TimeOfDay,
  instantText,
  plainDate,
  plainTime,
  toInstant,
} from './iso';

/**
 * The trade day an instant falls on, as the shop's clock on the wall shows it.
 *
 * @param zone IANA time zone, `America/Chicago`
 * @throws RangeError for an unknown zone or a malformed instant
 */
export function tradeDayOf(instant: Instant, zone: string): IsoDate {
  return toInstant(instant).toZonedDateTimeISO(zone).toPlainDate().toString();
}

/**
 * The instant at which the wall clock in a zone shows this date and time.
 * A time skipped by the start of daylight time is read with the offset before it (so an hour later
 * on the clock); of a time that occurs twice the first is meant (RFC 5545, 3.3.5).
 *
 * @throws RangeError for a date or time that does not exist, or an unknown zone
 */
export function instantAt(date: IsoDate, time: TimeOfDay, zone: string): string {
  const zoned = plainDate(date).toZonedDateTime({ timeZone: zone, plainTime: plainTime(time) });
  return instantText(zoned.toInstant());
}

/** The instant at which a trade day begins: midnight, or later where midnight is skipped. */
export function startOfTradeDay(date: IsoDate, zone: string): string {
  return instantText(plainDate(date).toZonedDateTime({ timeZone: zone }).toInstant());
}

/** @param days whole days, negative to go back */
export function addDays(date: IsoDate, days: number): IsoDate {
  return plainDate(date).add({ days }).toString();
}

/** Whole days from one date to another: 0 for the same day, negative when `to` is earlier. */
export function daysBetween(from: IsoDate, to: IsoDate): number {
  return plainDate(from).until(plainDate(to), { largestUnit: 'days' }).days;
}

/** Below zero when `a` is earlier, above when later: an order for sorting. */
export function compareDates(a: IsoDate, b: IsoDate): number {
  return Temporal.PlainDate.compare(plainDate(a), plainDate(b));
}

/**
 * When a statement falls due: calendar days after its date, as printed terms ("net 30") count them.
 *
 * @param termsDays 0 (on receipt) to 365
 * @throws RangeError outside these
 */
export function dueDate(statementDate: IsoDate, termsDays: number): IsoDate {
  if (!Number.isInteger(termsDays) || termsDays < 0 || termsDays > 365) {
    throw new RangeError(`Terms are 0 to 365 whole days, not ${termsDays}`);
  }
  return addDays(statementDate, termsDays);
}
