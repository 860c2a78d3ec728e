import * as fc from 'fast-check';
import { addDays } from '../calendar/trade-day';
import { occurrences } from './occurrences';
import { parseRule } from './rule-parts';
import { shiftForHolidays } from './shift-for-holidays';
import { validateRule } from './validate-rule';

const chicago = 'America/Chicago';
const days = (rule: string, date: string, from: string, to: string, limit = 100) =>
  occurrences(rule, { date }, chicago, { from, to, limit }).map((each) => each.date);

describe('occurrences', () => {
  it('lie within the window, both ends included, and are at most as many as asked for', () => {
    const weekly = 'FREQ=WEEKLY;BYDAY=MO';
    expect(days(weekly, '2026-01-05', '2026-01-12', '2026-01-26')).toEqual([
      '2026-01-12',
      '2026-01-19',
      '2026-01-26',
    ]);
    expect(days(weekly, '2026-01-05', '2026-01-06', '2026-01-11')).toEqual([]);
    expect(days(weekly, '2026-01-05', '2000-01-01', '2099-12-31', 2)).toEqual([
      '2026-01-05',
      '2026-01-12',
    ]);
  });

  it('are counted from the start, also when the window begins later', () => {
    expect(days('FREQ=DAILY;COUNT=5', '2026-01-01', '2026-01-04', '2026-12-31')).toEqual([
      '2026-01-04',
      '2026-01-05',
    ]);
    expect(days('FREQ=WEEKLY;INTERVAL=2', '2026-01-01', '2036-01-01', '2036-01-31')).toEqual([
      '2036-01-03', // 3,654 days after the start: 261 times 14
      '2036-01-17',
      '2036-01-31',
    ]);
  });

  it('of whole days come also where a midnight is skipped', () => {
    const window = { from: '2023-09-02', to: '2023-09-04', limit: 9 };
    const found = occurrences('FREQ=DAILY', { date: '2023-09-01' }, 'America/Santiago', window);
    expect(found).toEqual([
      { date: '2023-09-02', at: '2023-09-02T04:00:00.000Z' },
      { date: '2023-09-03', at: '2023-09-03T04:00:00.000Z' },
      { date: '2023-09-04', at: '2023-09-04T03:00:00.000Z' },
    ]);
  });

  it('keep the time on the wall across the start of daylight time and skip a time it skips', () => {
    const window = { from: '2026-03-07', to: '2026-03-09', limit: 9 };
    const at = (time: string) =>
      occurrences('FREQ=DAILY', { date: '2026-03-01', time }, chicago, window).map(
        (each) => each.at,
      );
    expect(at('09:00')).toEqual([
      '2026-03-07T15:00:00.000Z',
      '2026-03-08T14:00:00.000Z',
      '2026-03-09T14:00:00.000Z',
    ]);
    expect(at('02:30')).toEqual(['2026-03-07T08:30:00.000Z', '2026-03-09T07:30:00.000Z']);
  });

  it.each([
    ['20260103', '09:00', 3],
    ['20260103', undefined, 3],
    ['20260103T090000', '09:00', 3],
    ['20260103T085959', '09:00', 2],
    ['20260103T145959Z', '09:00', 2],
    ['20260103T150000Z', '09:00', 3],
    ['20260104T055959Z', undefined, 3],
    ['20260104T060000Z', undefined, 4],
  ])('read UNTIL=%s in the zone for a start at %s', (until, time, count) => {
    const window = { from: '2026-01-01', to: '2026-02-01', limit: 99 };
    const start = { date: '2026-01-01', time };
    expect(occurrences(`FREQ=DAILY;UNTIL=${until}`, start, chicago, window)).toHaveLength(count);
  });

  it('refuse windows, starts and zones that make no sense', () => {
    const window = { from: '2026-01-01', to: '2026-02-01', limit: 5 };
    const start = { date: '2026-01-01' };
    expect(() => occurrences('FREQ=DAILY', start, chicago, { ...window, limit: 0 })).toThrow(
      /limit/,
    );
    expect(() => occurrences('FREQ=DAILY', start, chicago, { ...window, to: 'soon' })).toThrow(
      /date/,
    );
    expect(() => occurrences('FREQ=DAILY', { date: '2026-02-30' }, chicago, window)).toThrow(
      /date/,
    );
    expect(() => occurrences('FREQ=DAILY', start, 'Nowhere/Land', window)).toThrow(RangeError);
  });
});

describe('the work of finding occurrences', () => {
  it.each([
    'FREQ=YEARLY;BYMONTH=2;BYMONTHDAY=30',
    'FREQ=MONTHLY;BYMONTH=2;BYMONTHDAY=30',
    'FREQ=WEEKLY;BYMONTH=2;INTERVAL=9999',
    'FREQ=DAILY;BYMONTH=2;BYMONTHDAY=30',
    'FREQ=YEARLY;BYYEARDAY=366;BYWEEKNO=10',
    'FREQ=SECONDLY;BYMONTH=2;BYMONTHDAY=30',
  ])('ends for %s, which never comes', (rule) => {
    const started = performance.now();
    expect(days(rule, '2026-03-01', '2026-03-02', '2126-01-01')).toEqual([]);
    expect(performance.now() - started).toBeLessThan(5_000);
  });

  it('ends for endless rules, near or far', () => {
    expect(days('FREQ=SECONDLY', '2026-01-01', '2026-01-01', '9999-12-31', 3)).toHaveLength(3);
    expect(days('FREQ=DAILY', '1990-01-01', '2090-01-01', '9999-12-31', 2)).toEqual([
      '2090-01-01',
      '2090-01-02',
    ]);
  });

  it('is refused when it would not be bounded', () => {
    const rule = 'FREQ=SECONDLY;COUNT=99999;BYSECOND=1';
    expect(() => days(rule, '1990-01-01', '2090-01-01', '2090-02-01')).toThrow(/Too many steps/);
  });
});

describe('a rule for rounds', () => {
  it.each([
    'FREQ=WEEKLY',
    'rrule:freq=monthly;byday=1fr',
    'FREQ=MONTHLY;INTERVAL=3;BYMONTHDAY=1,-1',
    'FREQ=YEARLY;BYMONTH=3,9;BYDAY=-1SU;COUNT=10',
    'FREQ=DAILY;INTERVAL=10;UNTIL=20261231',
    'FREQ=YEARLY;BYWEEKNO=20;BYDAY=MO;WKST=SU',
  ])('accepts %s', (rule) => {
    expect(validateRule(rule, { date: '2026-01-01' })).toEqual({ valid: true });
  });

  it.each([
    ['', /NAME=VALUE/],
    ['MONTHLY', /NAME=VALUE/],
    ['INTERVAL=2', /needs FREQ/],
    ['FREQ=FORTNIGHTLY', /FREQ is one of/],
    ['FREQ=HOURLY', /daily at most/],
    ['FREQ=SECONDLY', /daily at most/],
    ['FREQ=DAILY;BYHOUR=9,17', /planned by day/],
    ['FREQ=DAILY;FREQ=DAILY', /given twice/],
    ['FREQ=DAILY;FOO=1', /no part FOO/],
    ['FREQ=DAILY;INTERVAL=0', /INTERVAL is a whole number/],
    ['FREQ=DAILY;INTERVAL=1.5', /INTERVAL is a whole number/],
    ['FREQ=DAILY;COUNT=-1', /COUNT is a whole number/],
    ['FREQ=DAILY;COUNT=2;UNTIL=20260101', /not both/],
    ['FREQ=DAILY;UNTIL=20260230', /UNTIL is a date/],
    ['FREQ=DAILY;UNTIL=tomorrow', /UNTIL is a date/],
    ['FREQ=MONTHLY;BYMONTHDAY=32', /BYMONTHDAY holds/],
    ['FREQ=MONTHLY;BYMONTHDAY=0', /BYMONTHDAY holds/],
    ['FREQ=MONTHLY;BYMONTH=-1', /BYMONTH holds/],
    ['FREQ=MONTHLY;BYDAY=XX', /BYDAY holds/],
    ['FREQ=MONTHLY;BYDAY=0MO', /BYDAY holds/],
    ['FREQ=MONTHLY;BYDAY=54MO', /BYDAY holds/],
    ['FREQ=WEEKLY;BYDAY=2MO', /need FREQ=MONTHLY/],
    ['FREQ=WEEKLY;BYMONTHDAY=1', /does not go with/],
    ['FREQ=MONTHLY;BYYEARDAY=1', /does not go with/],
    ['FREQ=MONTHLY;BYWEEKNO=1', /needs FREQ=YEARLY/],
    ['FREQ=YEARLY;BYWEEKNO=1;BYDAY=1MO', /do not go with BYWEEKNO/],
    ['FREQ=MONTHLY;BYSETPOS=1', /another part/],
    ['FREQ=YEARLY;BYMONTH=2;BYMONTHDAY=30', /no day that ever comes/],
    ['FREQ=DAILY;UNTIL=20251231', /no day that ever comes/],
  ])('refuses %s and says why', (rule, problem) => {
    const verdict = validateRule(rule, { date: '2026-01-01' });
    expect(verdict).toEqual({ valid: false, problem: expect.stringMatching(problem) });
  });

  it('never breaks on text of any kind', () => {
    const part = fc.tuple(
      fc.constantFrom('FREQ', 'INTERVAL', 'BYDAY', 'BYMONTH', 'UNTIL', 'COUNT', 'X', ''),
      fc.oneof(fc.string(), fc.constantFrom('DAILY', 'MO', '1', '-1', '20260101', '1,2')),
    );
    const rule = fc.oneof(
      fc.string(),
      fc.array(part).map((all) => all.map((p) => p.join('=')).join(';')),
    );
    fc.assert(fc.property(rule, (text) => typeof validateRule(text).valid === 'boolean'));
  });

  it('reads numbers and days as they are written', () => {
    const { byDay, numbers } = parseRule('FREQ=MONTHLY;BYDAY=+1FR,-2MO,SU;BYMONTHDAY=-3,+4');
    expect(byDay).toEqual([
      { day: 'FR', nth: 1 },
      { day: 'MO', nth: -2 },
      { day: 'SU', nth: 0 },
    ]);
    expect(numbers.BYMONTHDAY).toEqual([-3, 4]);
  });
});

describe('a round on a closed day', () => {
  const closed = ['2026-12-25', '2026-12-26', '2026-12-28'];

  it('moves to the nearest open day in its direction', () => {
    expect(shiftForHolidays('2026-12-25', closed, 'next')).toBe('2026-12-27');
    expect(shiftForHolidays('2026-12-26', closed, 'previous')).toBe('2026-12-24');
    expect(shiftForHolidays('2026-12-26', closed, 'none')).toBe('2026-12-26');
    expect(shiftForHolidays('2026-12-24', closed, 'next')).toBe('2026-12-24');
    expect(shiftForHolidays('2026-12-25', (date) => date < '2027-01-02', 'next')).toBe(
      '2027-01-02',
    );
  });

  it('gives up on a shop that never opens', () => {
    expect(() => shiftForHolidays('2026-12-25', () => true, 'next')).toThrow(/No open day/);
  });

  it('never lands on a closed day, nor in the wrong direction', () => {
    const offsets = fc.uniqueArray(fc.integer({ min: -20, max: 20 }));
    fc.assert(
      fc.property(offsets, fc.constantFrom('next' as const, 'previous' as const), (list, shift) => {
        const dates = list.map((offset) => addDays('2026-06-15', offset));
        const moved = shiftForHolidays('2026-06-15', dates, shift);
        expect(dates).not.toContain(moved);
        expect(shift === 'next' ? moved >= '2026-06-15' : moved <= '2026-06-15').toBe(true);
      }),
    );
  });
});
