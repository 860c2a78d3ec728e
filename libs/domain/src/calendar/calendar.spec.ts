import * as fc from 'fast-check';
import { isIsoDate, isTimeOfDay, isTimeZone } from './iso';
import { monthBounds, monthOf, nextMonth, previousMonth, statementDueAt } from './month';
import { addDays, daysBetween, dueDate, instantAt, startOfTradeDay, tradeDayOf } from './trade-day';

const chicago = 'America/Chicago';
const hourMs = 3_600_000;

describe('dates', () => {
  it('accepts only dates that exist, written in full', () => {
    for (const good of ['2024-02-29', '2026-12-31', '0001-01-01'])
      expect(isIsoDate(good)).toBe(true);
    for (const bad of [
      '2026-02-29',
      '2026-13-01',
      '2026-00-10',
      '2026-1-1',
      '20260101',
      '',
      '0000-01-01',
    ])
      expect(isIsoDate(bad)).toBe(false);
  });

  it('accepts times to the minute and zones the runtime knows', () => {
    expect(['00:00', '23:59', '24:00', '9:00'].map(isTimeOfDay)).toEqual([
      true,
      true,
      false,
      false,
    ]);
    const zones = ['Europe/Dublin', 'Nowhere/Land', '', '+05:30', 'UTC-3'];
    expect(zones.map(isTimeZone)).toEqual([true, false, false, false, false]);
  });

  it('counts days across a leap day', () => {
    expect(daysBetween('2024-02-28', '2024-03-01')).toBe(2);
    expect(daysBetween('2024-03-01', '2024-02-28')).toBe(-2);
    expect(dueDate('2024-01-31', 30)).toBe('2024-03-01');
    expect(() => dueDate('2024-01-31', -1)).toThrow(RangeError);
    expect(() => addDays('2023-02-29', 1)).toThrow(/Not a date/);
  });
});

describe('trade days', () => {
  it('takes the day from the shop clock, not from UTC', () => {
    expect(tradeDayOf('2026-03-01T05:59:59.999Z', chicago)).toBe('2026-02-28');
    expect(tradeDayOf(new Date('2026-03-01T06:00:00Z'), chicago)).toBe('2026-03-01');
    expect(tradeDayOf('2026-03-01T11:00:00Z', 'Pacific/Auckland')).toBe('2026-03-02');
  });

  it('reads a skipped hour an hour later and the first of a doubled hour', () => {
    expect(instantAt('2026-03-08', '02:30', chicago)).toBe('2026-03-08T08:30:00.000Z');
    expect(instantAt('2026-11-01', '01:30', chicago)).toBe('2026-11-01T06:30:00.000Z');
  });

  it('starts a day later where midnight is skipped', () => {
    // Chile put its clocks forward at midnight of 2023-09-03.
    expect(startOfTradeDay('2023-09-03', 'America/Santiago')).toBe('2023-09-03T04:00:00.000Z');
  });

  it('refuses an unknown zone', () => {
    expect(() => tradeDayOf('2026-03-01T06:00:00Z', 'Nowhere/Land')).toThrow(RangeError);
  });
});

describe('months', () => {
  it('bounds a month in the shop zone across the start of daylight time', () => {
    expect(monthBounds('2026-03', chicago)).toEqual({
      firstDay: '2026-03-01',
      lastDay: '2026-03-31',
      from: '2026-03-01T06:00:00.000Z',
      until: '2026-04-01T05:00:00.000Z',
    });
  });

  it('leaves no gap and no overlap between neighbouring months', () => {
    const month = fc
      .tuple(fc.integer({ min: 1990, max: 2090 }), fc.integer({ min: 1, max: 12 }))
      .map(([year, m]) => `${year}-${String(m).padStart(2, '0')}`);
    const zone = fc.constantFrom(chicago, 'Europe/Dublin', 'Pacific/Auckland', 'America/Santiago');
    fc.assert(
      fc.property(month, zone, (m, z) => {
        const bounds = monthBounds(m, z);
        expect(bounds.until).toBe(monthBounds(nextMonth(m), z).from);
        expect(monthOf(bounds.from, z)).toBe(m);
        expect(monthOf(new Date(Date.parse(bounds.until) - 1), z)).toBe(m);
        expect(previousMonth(nextMonth(m))).toBe(m);
        const days = daysBetween(bounds.firstDay, bounds.lastDay) + 1;
        const off = Math.abs(
          Date.parse(bounds.until) - Date.parse(bounds.from) - days * 24 * hourMs,
        );
        expect(off).toBeLessThanOrEqual(hourMs);
      }),
    );
  });

  it('turns the year', () => {
    expect([previousMonth('2026-01'), nextMonth('2025-12')]).toEqual(['2025-12', '2026-01']);
    expect(() => nextMonth('2025-13')).toThrow(/Not a month/);
  });
});

describe('when the close of a month falls due', () => {
  it('is on the statement day of the month after, on the shop clock', () => {
    expect(statementDueAt('2026-02', 1, 6, chicago)).toBe('2026-03-01T12:00:00.000Z');
    expect(statementDueAt('2026-03', 1, 6, chicago)).toBe('2026-04-01T11:00:00.000Z');
  });

  it('falls on the last day when the month after is too short', () => {
    expect(statementDueAt('2026-01', 31, 0, 'UTC')).toBe('2026-02-28T00:00:00.000Z');
  });

  it('stands still when its hour is skipped', () => {
    expect(statementDueAt('2026-02', 8, 2, chicago)).toBe('2026-03-08T08:00:00.000Z');
  });

  it('refuses days and hours that no calendar has', () => {
    expect(() => statementDueAt('2026-01', 0, 6, chicago)).toThrow(/statement day/);
    expect(() => statementDueAt('2026-01', 1, 24, chicago)).toThrow(/hour/);
  });
});
