import fc from 'fast-check';
import { settleQuotas, share } from './share';

describe('share', () => {
  it.each([
    [10_000, [1, 1, 1], [3334, 3333, 3333]],
    [100, [1, 2, 3], [17, 33, 50]],
    [-10_000, [1, 1, 1], [-3334, -3333, -3333]],
    [100, [0, 1, 0, 1], [0, 50, 0, 50]],
    [1, [1, 3], [0, 1]],
    [0, [2, 5], [0, 0]],
    [0, [], []],
    [95_00, [7], [95_00]],
  ])('%d over %p is %p', (total, weights, parts) => {
    expect(share(total, weights)).toEqual(parts);
  });

  it.each([[[-1, 2]], [[0, 0]], [[0.5, 1]], [[]]])('refuses weights %p', (weights) => {
    expect(() => share(100, weights)).toThrow(RangeError);
  });

  const totals = fc.integer({ min: -1_000_000_000, max: 1_000_000_000 });
  const weights = fc
    .array(fc.nat(100_000), { minLength: 1, maxLength: 40 })
    .filter((all) => all.some((weight) => weight > 0));

  it('adds up, stays within one unit of the quota, and mirrors', () => {
    fc.assert(
      fc.property(totals, weights, (total, all) => {
        const parts = share(total, all);
        const sum = all.reduce((a, b) => a + b, 0);
        expect(parts.reduce((a, b) => a + b, 0)).toBe(total);
        parts.forEach((part, i) => {
          const away = BigInt(part) * BigInt(sum) - BigInt(total) * BigInt(all[i] ?? 0);
          expect(away < BigInt(sum) && away > -BigInt(sum)).toBe(true);
        });
        expect(share(-total, all).map((part) => 0 - part)).toEqual(parts);
      }),
    );
  });
});

describe('settleQuotas', () => {
  it('settles fractions of both signs on a given total', () => {
    expect(settleQuotas([15n, -4n, 5n], 10n, 2)).toEqual([2, 0, 0]);
  });

  it('refuses a total out of reach', () => {
    expect(() => settleQuotas([15n, 5n], 10n, 5)).toThrow(RangeError);
  });
});
