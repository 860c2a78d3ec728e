/**
 * Streamlined Sales and Use Tax Agreement, section 324, as enacted in North Dakota Century Code
 * 57-39.4-25 and Rhode Island General Laws 44-18.1-25: (1) carry the tax to the third decimal
 * place; (2) round up to the next cent whenever the third decimal place is greater than four;
 * sellers may compute by item or by invoice; the rule may be applied to state and local taxes
 * added together. North Dakota Administrative Code 81-04.1-01-29 adds: four or less, round down.
 */
import { rateFor, taxByLine, taxOn } from '@lib/domain';
import * as fc from 'fast-check';

/** The rule as the statute's words have it, on the decimal digits of the tax: `0.045`. */
function roundedByThirdDecimal(tax: string): number {
  const [whole = '', decimals = ''] = tax.split('.');
  const cents = Number(whole + decimals.slice(0, 2));
  return Number(decimals.charAt(2)) > 4 ? cents + 1 : cents;
}

/** Cents times thousandths of a percent, written in dollars with all its seven decimals. */
function taxInDigits(cents: number, percentThousandths: number): string {
  const digits = String(BigInt(cents) * BigInt(percentThousandths)).padStart(8, '0');
  return `${digits.slice(0, -7)}.${digits.slice(-7)}`;
}

describe('the rounding rule of sales tax', () => {
  it.each([
    [1_00, 450, '0.045', 5],
    [1_00, 440, '0.044', 4],
    [10_99, 650, '0.714', 71],
    [19_99, 687.5, '1.374', 1_37],
    [10_00, 825, '0.825', 83],
    [33_32, 750, '2.499', 2_50],
    [6_66, 750, '0.499', 50],
    [99_99, 0, '0.000', 0],
  ])('%d cents at %d basis points: %s, so %d', (amount, rate, carried, tax) => {
    expect(taxInDigits(amount, rate * 10).slice(0, 5)).toBe(carried);
    expect(roundedByThirdDecimal(carried)).toBe(tax);
    expect(taxOn(amount, rate)).toBe(tax);
  });

  it('holds for whatever amount and rate', () => {
    fc.assert(
      fc.property(fc.nat(100_000_000), fc.nat(25_000), (cents, thousandths) => {
        expect(taxOn(cents, thousandths / 10)).toBe(
          roundedByThirdDecimal(taxInDigits(cents, thousandths)),
        );
      }),
      { seed: 324, numRuns: 2000 },
    );
  });

  it('adds state and local rates before it rounds', () => {
    const rates = [
      { place: 'ND', kind: 'part' as const, basisPoints: 500, validFrom: '2006-01-01' },
      { place: 'ND/Local', kind: 'part' as const, basisPoints: 225, validFrom: '2006-01-01' },
    ];
    const { basisPoints } = rateFor(rates, { kind: 'part', place: 'ND/Local', on: '2031-05-06' });
    // Apart: 0.0105 + 0.0047 is one cent and none; together 0.015225 is two.
    expect(taxOn(21, 500) + taxOn(21, 225)).toBe(1);
    expect(taxOn(21, basisPoints)).toBe(2);
  });

  it('computes by item or by invoice, as the seller elects', () => {
    const items = [1, 2, 3].map(() => ({ amount: 1_10, basisPoints: 500 }));
    const total = (taxes: number[]) => taxes.reduce((a, b) => a + b, 0);
    // 0.055 an item; 0.165 on the invoice.
    expect(total(taxByLine(items, 'line'))).toBe(18);
    expect(total(taxByLine(items, 'invoice'))).toBe(17);
  });
});
