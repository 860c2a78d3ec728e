import { type IsoDate, plainDate } from '../calendar/iso';
import { addDays } from '../calendar/trade-day';

/** Where a round goes that falls on a closed day; with `none` it stays. */
export type HolidayShift = 'next' | 'previous' | 'none';

/** A closed stretch longer than this is a mistake in the calendar, not a holiday. */
const longestClosure = 366;

/**
 * The open day nearest to a date in one direction; the date itself when it is open.
 *
 * @param closedDays closed dates, or a rule that knows them (for Sundays, say)
 * @throws RangeError when the shop is closed for more than a year on end
 */
export function shiftForHolidays(
  date: IsoDate,
  closedDays: Iterable<IsoDate> | ((date: IsoDate) => boolean),
  shift: HolidayShift,
): IsoDate {
  if (shift === 'none') return plainDate(date).toString();
  const isClosed = closedOn(closedDays);
  const step = shift === 'next' ? 1 : -1;
  let day = plainDate(date).toString();
  for (let moved = 0; moved <= longestClosure; moved += 1) {
    if (!isClosed(day)) return day;
    day = addDays(day, step);
  }
  throw new RangeError(`No open day within a year of ${date}`);
}

function closedOn(
  closedDays: Iterable<IsoDate> | ((date: IsoDate) => boolean),
): (date: IsoDate) => boolean {
  if (typeof closedDays === 'function') return closedDays;
  const dates = new Set(closedDays);
  return (date) => dates.has(date);
}
