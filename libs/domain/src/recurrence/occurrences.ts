import { RRuleTemporal } from 'rrule-temporal';
import { Temporal } from 'temporal-polyfill';
import { type IsoDate, type TimeOfDay, instantText, plainDate, plainTime } from '../calendar/iso';
import { instantAt, startOfTradeDay } from '../calendar/trade-day';
import { type RuleParts, frequencies, parseRule } from './rule-parts';

/** When a recurrence begins (DTSTART). Without a time it is about whole days. */
export interface RecurrenceStart {
  date: IsoDate;
  time?: TimeOfDay;
}

/** Trade days between which occurrences are wanted, both included, and how many at most. */
export interface OccurrenceWindow {
  from: IsoDate;
  to: IsoDate;
  /** 1 to 10,000. */
  limit: number;
}

export interface Occurrence {
  /** The day in the zone. */
  date: IsoDate;
  /** The instant; for a recurrence of whole days the start of the day. */
  at: string;
}

const mostOccurrences = 10_000;
/** Steps of the library before it gives up: all days of 270 years, or all seconds of a day. */
const mostSteps = 100_000;

/**
 * The occurrences of a rule within a window, in order. The time of day stays what the wall clock
 * shows, across the start and end of daylight time; dates and times that do not exist are skipped.
 *
 * @param rule RFC 5545 recurrence rule; UNTIL without Z is read in the zone
 * @param zone IANA time zone
 * @throws RuleError for a malformed rule; RangeError for a malformed window or start, an unknown
 *   zone, or when finding out would take more than a bounded number of steps
 * Source: RFC 5545, 3.3.10 and 3.8.5.3.
 */
export function occurrences(
  rule: string,
  start: RecurrenceStart,
  zone: string,
  { from, to, limit }: OccurrenceWindow,
): Occurrence[] {
  if (!Number.isInteger(limit) || limit < 1 || limit > mostOccurrences) {
    throw new RangeError(`A limit is 1 to ${mostOccurrences}, not ${limit}`);
  }
  const parts = parseRule(rule);
  const recurrence = buildRecurrence(rule, parts, start, zone);
  const last = plainDate(to);
  const found: Occurrence[] = [];
  let first = laterOf(plainDate(from), plainDate(start.date));
  // Windows that grow: a few near occurrences of an endless rule must not cost all far ones.
  let span = frequencies.indexOf(parts.frequency) < frequencies.indexOf('DAILY') ? 1 : 366;
  while (found.length < limit && Temporal.PlainDate.compare(first, last) <= 0) {
    const end = earlierOf(first.add({ days: span - 1 }), last);
    found.push(...recurrence.within(first, end));
    first = end.add({ days: 1 });
    span *= 2;
  }
  return found.slice(0, limit);
}

interface Recurrence {
  within(first: Temporal.PlainDate, last: Temporal.PlainDate): Occurrence[];
}

function buildRecurrence(
  rule: string,
  parts: RuleParts,
  start: RecurrenceStart,
  zone: string,
): Recurrence {
  const wholeDays = start.time === undefined;
  // Whole days are reckoned in UTC, where each has a midnight: not every day does elsewhere.
  const reckonedIn = wholeDays ? 'UTC' : zone;
  const library = new RRuleTemporal({
    rruleString: libraryRule(rule, parts, start, zone),
    dtstart: plainDate(start.date).toZonedDateTime({
      timeZone: reckonedIn,
      plainTime: plainTime(start.time ?? '00:00'),
    }),
    temporal: Temporal,
    maxIterations: mostSteps,
    cache: false,
  });
  return {
    within: (first, last) => {
      const from = first.toZonedDateTime({ timeZone: reckonedIn });
      const until = last.add({ days: 1 }).toZonedDateTime({ timeZone: reckonedIn });
      const before = until.subtract({ milliseconds: 1 });
      return bounded(rule, () => library.between(from, before, true)).map((moment) => {
        const date = moment.toPlainDate().toString();
        const at = wholeDays ? startOfTradeDay(date, zone) : instantText(moment.toInstant());
        return { date, at };
      });
    },
  };
}

/** The rule as the library wants it: UNTIL a date for whole days, an instant in UTC for others. */
function libraryRule(rule: string, parts: RuleParts, start: RecurrenceStart, zone: string): string {
  const text = rule
    .trim()
    .toUpperCase()
    .replace(/^RRULE:/, '');
  if (parts.until === undefined) return `RRULE:${text}`;
  return `RRULE:${text.replace(/UNTIL=[^;]*/, `UNTIL=${libraryUntil(parts.until, start, zone)}`)}`;
}

function libraryUntil(until: string, start: RecurrenceStart, zone: string): string {
  const [day = '', time = ''] = until.split('T');
  const date = `${day.slice(0, 4)}-${day.slice(4, 6)}-${day.slice(6)}`;
  if (start.time === undefined) {
    if (!time.endsWith('Z')) return day;
    const instant = Temporal.Instant.from(`${date}T${time}`);
    return compact(instant.toZonedDateTimeISO(zone).toPlainDate().toString());
  }
  if (time.endsWith('Z')) return until;
  const clock = time === '' ? '23:59' : `${time.slice(0, 2)}:${time.slice(2, 4)}`;
  const seconds = Number(time === '' ? 59 : time.slice(4));
  const instant = Temporal.Instant.from(instantAt(date, clock, zone)).add({ seconds });
  return `${compact(instant.toString({ smallestUnit: 'second' }))}`;
}

function compact(text: string): string {
  return text.replace(/[:-]/g, '');
}

function bounded<T>(rule: string, work: () => T): T {
  try {
    return work();
  } catch (error) {
    if (error instanceof Error && /^Maximum (iterations|candidate)/i.test(error.message)) {
      throw new RangeError(`Too many steps to follow ${rule}`, { cause: error });
    }
    throw error;
  }
}

function laterOf(a: Temporal.PlainDate, b: Temporal.PlainDate): Temporal.PlainDate {
  return Temporal.PlainDate.compare(a, b) > 0 ? a : b;
}

function earlierOf(a: Temporal.PlainDate, b: Temporal.PlainDate): Temporal.PlainDate {
  return Temporal.PlainDate.compare(a, b) < 0 ? a : b;
}
