import { Temporal } from 'temporal-polyfill';

/** A calendar date, `YYYY-MM-DD`, years 0001 to 9999; in this product a trade day of the shop. */
export type IsoDate = string;
/** A calendar month, `YYYY-MM`. */
export type Month = string;
/** A time of day, `HH:MM` on the 24-hour clock. */
export type TimeOfDay = string;
/** A point in time: a `Date`, or ISO 8601 with an offset or Z, `2026-03-01T06:00:00.000Z`. */
export type Instant = Date | string;

const datePattern = /^(?!0000)\d{4}-\d{2}-\d{2}$/;
const monthPattern = /^(?!0000)\d{4}-(0[1-9]|1[0-2])$/;
const timePattern = /^([01]\d|2[0-3]):[0-5]\d$/;

/** True for a date that exists: 2026-02-30 is not one. Source: ISO 8601-1. */
export function isIsoDate(text: string): boolean {
  if (!datePattern.test(text)) return false;
  const day = Number(text.slice(8));
  return monthPattern.test(text.slice(0, 7)) && day >= 1 && day <= daysInMonth(text.slice(0, 7));
}

function isMonth(text: string): boolean {
  return monthPattern.test(text);
}

export function isTimeOfDay(text: string): boolean {
  return timePattern.test(text);
}

/**
 * True for a zone of the IANA time zone database that this runtime knows. A bare offset is none:
 * it has no summer time, and PostgreSQL reads its sign the other way round.
 */
export function isTimeZone(zone: string): boolean {
  try {
    return /^[A-Za-z]/.test(zone) && new Intl.DateTimeFormat('en', { timeZone: zone }) !== null;
  } catch {
    return false;
  }
}

/** @throws RangeError when the text is no existing date written `YYYY-MM-DD`. */
export function plainDate(text: IsoDate): Temporal.PlainDate {
  if (!isIsoDate(text)) throw new RangeError(`Not a date (YYYY-MM-DD): ${text}`);
  return Temporal.PlainDate.from(text);
}

/** @throws RangeError when the text is no month written `YYYY-MM`. */
export function plainMonth(text: Month): Temporal.PlainYearMonth {
  if (!isMonth(text)) throw new RangeError(`Not a month (YYYY-MM): ${text}`);
  return Temporal.PlainYearMonth.from(text);
}

/** @throws RangeError when the text is no time of day written `HH:MM`. */
export function plainTime(text: TimeOfDay): Temporal.PlainTime {
  if (!isTimeOfDay(text)) throw new RangeError(`Not a time of day (HH:MM): ${text}`);
  return Temporal.PlainTime.from(text);
}

/** @throws RangeError when the value names no point in time. */
export function toInstant(instant: Instant): Temporal.Instant {
  if (typeof instant === 'string') return Temporal.Instant.from(instant);
  return Temporal.Instant.fromEpochMilliseconds(instant.getTime());
}

/** Always three decimals and Z, so that instants written by us also sort as text. */
export function instantText(instant: Temporal.Instant): string {
  return instant.toString({ fractionalSecondDigits: 3 });
}

/** Days in a month already known to be well-formed; Gregorian leap years. */
function daysInMonth(month: Month): number {
  return Temporal.PlainYearMonth.from(month).daysInMonth;
}
