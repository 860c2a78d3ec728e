import * as fc from 'fast-check';
import { daysIn, prorate, prorateParts } from './prorate';
import { addDays } from './trade-day';

const march = { from: '2026-03-01', to: '2026-03-31' };

describe('a part of a period', () => {
  it('is charged by the day', () => {
    expect(prorate(31000, march, '2026-03-20', '2026-03-31')).toBe(12000);
    expect(prorate(9900, march, '2026-03-10', '2026-03-31')).toBe(7026); // 9900 x 22 / 31 = 7025.8
    expect(prorate(9900, march, '2026-03-01', '2026-03-31')).toBe(9900);
  });

  it('counts a leap day', () => {
    expect(
      prorate(29000, { from: '2024-02-01', to: '2024-02-29' }, '2024-02-29', '2024-02-29'),
    ).toBe(1000);
  });

  it('counts no day outside the period', () => {
    expect(prorate(31000, march, '2026-02-01', '2026-03-02')).toBe(2000);
    expect(prorate(31000, march, '2026-04-01', '2026-04-02')).toBe(0);
    expect(() => prorate(31000, march, '2026-03-02', '2026-03-01')).toThrow(/before it starts/);
  });

  it('adds up over neighbours, each within a cent of its days', () => {
    const cuts = fc.uniqueArray(fc.integer({ min: 1, max: 30 }), { maxLength: 6 });
    fc.assert(
      fc.property(fc.nat(1_000_000), cuts, (amount, days) => {
        const starts = [0, ...days.sort((a, b) => a - b)];
        const parts = starts.map((start, index) => ({
          from: addDays(march.from, start),
          to: addDays(march.from, (starts[index + 1] ?? 31) - 1),
        }));
        const amounts = prorateParts(amount, march, parts);
        expect(amounts.reduce((sum, part) => sum + part, 0)).toBe(amount);
        amounts.forEach((part, index) => {
          const exactly = (amount * daysIn(parts[index]!)) / 31;
          expect(Math.abs(part - exactly)).toBeLessThan(1);
        });
      }),
    );
  });

  it('refuses parts that leave out a day or count one twice', () => {
    const first = { from: '2026-03-01', to: '2026-03-10' };
    const rest = { from: '2026-03-11', to: '2026-03-31' };
    expect(prorateParts(3100, march, [first, rest])).toEqual([1000, 2100]);
    expect(() => prorateParts(3100, march, [first, { ...rest, from: '2026-03-12' }])).toThrow();
    expect(() => prorateParts(3100, march, [first, { ...rest, from: '2026-03-10' }])).toThrow();
    expect(() => prorateParts(3100, march, [first])).toThrow(/do not end/);
    expect(() => prorateParts(3100, march, [rest])).toThrow(/follow on/);
    expect(() => prorateParts(3100, march, [])).toThrow(/do not end/);
  });
});
