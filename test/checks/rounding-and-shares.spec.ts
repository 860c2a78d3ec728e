import { minorDigits, roundHalfEven, roundHalfUp, share } from '@lib/domain';
import {
  allocate,
  dinero,
  halfAwayFromZero,
  halfEven,
  toSnapshot,
  transformScale,
} from 'dinero.js';
import * as currencies from 'dinero.js/currencies';
import * as fc from 'fast-check';

const seed = 1790;

/**
 * The first apportionment of the House of Representatives as Hamilton's method gives it: 60 seats
 * over the populations of 1790. Source: electowiki, "Hamilton method".
 */
const states: [name: string, population: number, seats: number][] = [
  ['Virginia', 630_560, 11],
  ['Massachusetts', 475_327, 8],
  ['Pennsylvania', 432_879, 7],
  ['North Carolina', 353_523, 6],
  ['New York', 331_589, 6],
  ['Maryland', 278_514, 5],
  ['Connecticut', 236_841, 4],
  ['South Carolina', 206_236, 3],
  ['New Jersey', 179_570, 3],
  ['New Hampshire', 141_822, 2],
  ['Vermont', 85_533, 1],
  ['Georgia', 70_835, 1],
  ['Kentucky', 68_705, 1],
  ['Rhode Island', 68_446, 1],
  ['Delaware', 55_540, 1],
];

describe('largest remainders, by published figures', () => {
  it('apportions the House of 1790', () => {
    const populations = states.map(([, population]) => population);
    expect(share(60, populations)).toEqual(states.map(([, , seats]) => seats));
  });

  it('shares 100.00 in three as 33.34, 33.33, 33.33', () => {
    expect(share(100_00, [1, 1, 1])).toEqual([33_34, 33_33, 33_33]);
  });
});

/** An independent library for money. It shares what is left in order, not by largest remainder. */
describe('shares beside dinero.js', () => {
  const allocated = (amount: number, ratios: number[]) =>
    allocate(dinero({ amount, currency: currencies.USD }), ratios).map(
      (part) => toSnapshot(part).amount,
    );
  const amount = fc.integer({ min: -1_000_000_000, max: 1_000_000_000 });

  it('agrees wherever all weights are equal', () => {
    fc.assert(
      fc.property(amount, fc.integer({ min: 1, max: 50 }), (total, parts) => {
        const weights = Array.from({ length: parts }, () => 1);
        // It gives the units left over to the first parts, also below zero; so does a mirror.
        expect(share(total, weights)).toEqual(allocated(total, weights));
      }),
      { seed },
    );
  });

  it('adds up to the same, and is never further from the exact quota', () => {
    const weights = fc
      .array(fc.nat(1_000), { minLength: 1, maxLength: 20 })
      .filter((all) => all.some((weight) => weight > 0));
    fc.assert(
      fc.property(fc.nat(1_000_000_000), weights, (total, all) => {
        const sum = all.reduce((a, b) => a + b, 0);
        const distance = (parts: number[]) =>
          parts.reduce((d, part, i) => d + Math.abs(part - (total * (all[i] ?? 0)) / sum), 0);
        const theirs = allocated(total, all);
        const ours = share(total, all);
        expect(ours.reduce((a, b) => a + b, 0)).toBe(theirs.reduce((a, b) => a + b, 0));
        expect(distance(ours)).toBeLessThanOrEqual(distance(theirs) + 1e-6);
      }),
      { seed },
    );
  });
});

describe('rounding beside dinero.js', () => {
  // It answers minus zero for what rounds up to nothing; adding zero makes one zero of the two.
  const scaled = (amount: number, scale: number, divide: typeof halfEven) =>
    toSnapshot(transformScale(dinero({ amount, currency: currencies.USD, scale }), 2, divide))
      .amount + 0;

  it('settles thousandths and hundred-thousandths of a dollar alike', () => {
    fc.assert(
      fc.property(
        fc.integer({ min: -100_000_000, max: 100_000_000 }),
        fc.constantFrom(3, 4, 5),
        (amount, scale) => {
          const per = 10 ** (scale - 2);
          expect(roundHalfUp(amount, per)).toBe(scaled(amount, scale, halfAwayFromZero));
          expect(roundHalfEven(amount, per)).toBe(scaled(amount, scale, halfEven));
        },
      ),
      { seed, numRuns: 500 },
    );
  });
});

/**
 * Decimals by ISO 4217, list one, as dinero.js carries them. Ariary and ouguiya are left out:
 * dinero.js counts them in fifths, the list states two decimals.
 */
describe('minor units', () => {
  const decimal = Object.values(currencies).filter(({ base }) => base === 10);

  it.each(decimal.map(({ code, exponent }) => [code, exponent]))('%s has %d', (code, digits) => {
    expect(minorDigits(code)).toBe(digits);
  });

  it('compares more than 150 currencies', () => {
    expect(decimal.length).toBeGreaterThan(150);
  });
});
