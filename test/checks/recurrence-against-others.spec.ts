/**
 * Independent implementations of RFC 5545: the `rrule` package (a port of python-dateutil) and
 * `ical.js` (calendar software), on rules drawn at random with a fixed seed. Neither shares code
 * with the engine behind `occurrences`.
 */
import { occurrences } from '@lib/domain';
import * as fc from 'fast-check';
import ICAL from 'ical.js';
import { RRule } from 'rrule';

const most = 60;
const horizon = '2039-12-31';

function ours(rule: string, date: string): string[] {
  const window = { from: date, to: horizon, limit: most };
  return occurrences(rule, { date }, 'UTC', window).map((each) => each.date);
}

function byRrule(rule: string, date: string): string[] {
  const dtstart = new Date(`${date}T00:00:00Z`);
  const until = new Date(`${horizon}T00:00:00Z`);
  const all = new RRule({ ...RRule.parseString(rule), dtstart }).between(
    dtstart,
    until,
    true,
    (_date, n) => n < most,
  );
  return all.slice(0, most).map((each) => each.toISOString().slice(0, 10));
}

function byIcal(rule: string, date: string): string[] {
  const iterator = ICAL.Recur.fromString(rule).iterator(ICAL.Time.fromDateString(date));
  const found: string[] = [];
  for (let next = iterator.next(); next && found.length < most; next = iterator.next()) {
    const day = next.toString().slice(0, 10);
    if (day > horizon) break;
    found.push(day);
  }
  return found;
}

const days = ['MO', 'TU', 'WE', 'TH', 'FR', 'SA', 'SU'];
const some = <T>(values: fc.Arbitrary<T>, maxLength: number) =>
  fc.uniqueArray(values, { minLength: 1, maxLength }).map((list) => list.join(','));
const weekdays = some(fc.constantFrom(...days), 4);
const nthDays = (...nths: string[]) =>
  some(
    fc.tuple(fc.constantFrom(...nths), fc.constantFrom(...days)).map((pair) => pair.join('')),
    3,
  );
const oneWayDays = fc.oneof(nthDays('1', '2', '3', '4'), nthDays('-1', '-2'));
const fromStart = fc.integer({ min: 1, max: 31 });
const fromEnd = fc.integer({ min: -10, max: -1 });
const mixedDays = some(fc.oneof(fromStart, fromEnd), 4);
const months = some(fc.integer({ min: 1, max: 12 }), 3);
const date = fc
  .integer({ min: 0, max: 3_000 })
  .map((offset) => new Date(Date.UTC(2019, 0, 1 + offset)).toISOString().slice(0, 10));
const interval = fc.integer({ min: 1, max: 6 });
const end = fc.constantFrom('', ';COUNT=7', ';COUNT=25', ';UNTIL=20291115');

const withEnd = (...rules: fc.Arbitrary<string>[]) =>
  fc.oneof(...rules).chain((text) => end.map((ending) => text + ending));

const common = withEnd(
  fc.tuple(interval).map(([n]) => `FREQ=DAILY;INTERVAL=${n}`),
  fc.tuple(interval, months).map(([n, m]) => `FREQ=DAILY;INTERVAL=${n};BYMONTH=${m}`),
  fc
    .tuple(interval, weekdays, fc.constantFrom('MO', 'SU'))
    .map(([n, d, start]) => `FREQ=WEEKLY;INTERVAL=${n};BYDAY=${d};WKST=${start}`),
  fc.tuple(interval, oneWayDays).map(([n, d]) => `FREQ=MONTHLY;INTERVAL=${n};BYDAY=${d}`),
  fc
    .tuple(interval, fc.oneof(some(fromStart, 4), some(fromEnd, 4)))
    .map(([n, d]) => `FREQ=MONTHLY;INTERVAL=${n};BYMONTHDAY=${d}`),
  fc
    .tuple(interval, months, oneWayDays)
    .map(([n, m, d]) => `FREQ=YEARLY;INTERVAL=${n};BYMONTH=${m};BYDAY=${d}`),
);

/**
 * What ical.js 2.2 gets wrong or refuses: a weekday beside a date that the first month lacks, one
 * day named both from the start and from the end, the 29th to 31st of months of a year.
 */
const harder = withEnd(
  fc
    .tuple(interval, nthDays('1', '3', '4', '-1', '-2'))
    .map(([n, d]) => `FREQ=MONTHLY;INTERVAL=${n};BYDAY=${d}`),
  fc.tuple(interval, mixedDays).map(([n, d]) => `FREQ=MONTHLY;INTERVAL=${n};BYMONTHDAY=${d}`),
  fc
    .tuple(interval, weekdays, mixedDays)
    .map(([n, d, m]) => `FREQ=MONTHLY;INTERVAL=${n};BYDAY=${d};BYMONTHDAY=${m}`),
  fc
    .tuple(interval, months, mixedDays)
    .map(([n, m, d]) => `FREQ=YEARLY;INTERVAL=${n};BYMONTH=${m};BYMONTHDAY=${d}`),
);

const runs = { numRuns: 300, seed: 5545 };

describe('rounds found by us and by others', () => {
  it('are the same as by rrule', () => {
    fc.assert(
      fc.property(fc.oneof(common, harder), date, (text, start) => {
        expect(ours(text, start)).toEqual(byRrule(text, start));
      }),
      runs,
    );
  });

  it('are the same as by ical.js', () => {
    fc.assert(
      fc.property(common, date, (text, start) => {
        // The standard leaves open what a start outside its rule means; ical.js counts it as one.
        const first = byRrule(text, start)[0];
        if (first !== undefined) expect(ours(text, first)).toEqual(byIcal(text, first));
      }),
      runs,
    );
  });

  it('with a pick from the month are the same as by rrule', () => {
    const picked = fc
      .tuple(interval, weekdays, fc.constantFrom(1, 2, 3, -1, -2))
      .map(([n, d, at]) => `FREQ=MONTHLY;INTERVAL=${n};BYDAY=${d};BYSETPOS=${at}`);
    fc.assert(
      fc.property(picked, date, (text, start) => {
        expect(ours(text, start)).toEqual(byRrule(text, start));
      }),
      runs,
    );
  });

  it('by weeks of the year are the same as by rrule', () => {
    // Not the first and last week: rrule loses days of theirs that lie in the neighbouring year.
    const weekNumbers = some(fc.integer({ min: 2, max: 51 }), 3);
    const byWeek = fc
      .tuple(interval, weekNumbers, weekdays)
      .map(([n, w, d]) => `FREQ=YEARLY;INTERVAL=${n};BYWEEKNO=${w};BYDAY=${d}`);
    fc.assert(
      fc.property(byWeek, date, (text, start) => {
        expect(ours(text, start)).toEqual(byRrule(text, start));
      }),
      runs,
    );
  });
});
