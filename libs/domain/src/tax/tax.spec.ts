import fc from 'fast-check';
import { type Exemption, type TaxRate } from './rate';
import { isExempt, rateFor, taxByLine, taxOn } from './tax';

const rates: TaxRate[] = [
  { place: '', kind: 'part', basisPoints: 100, validFrom: '2030-01-01' },
  { place: 'North', kind: 'part', basisPoints: 600, validFrom: '2030-01-01' },
  { place: 'North', kind: 'part', basisPoints: 687.5, validFrom: '2031-04-01' },
  { place: 'North/Alder', kind: 'part', basisPoints: 50, validFrom: '2030-01-01' },
  { place: 'North/Alder', kind: 'labour', basisPoints: 25, validFrom: '2030-01-01' },
  { place: 'South', kind: 'part', basisPoints: 900, validFrom: '2030-01-01' },
];

describe('rateFor', () => {
  it.each([
    ['part', 'North/Alder', '2031-03-31', 750],
    ['part', 'North/Alder', '2031-04-01', 837.5],
    ['part', 'North/Birch', '2031-04-01', 787.5],
    ['part', 'South', '2031-04-01', 1000],
    ['part', 'Elsewhere', '2031-04-01', 100],
    ['labour', 'North/Alder', '2031-04-01', 25],
    ['labour', 'North', '2031-04-01', 0],
    ['part', 'North/Alder', '2029-12-31', 0],
  ] as const)('%s at %s on %s is taxed %d', (kind, place, on, basisPoints) => {
    expect(rateFor(rates, { kind, place, on }).basisPoints).toBe(basisPoints);
  });

  it('names the rows it added, widest place first', () => {
    const { parts } = rateFor(rates, { kind: 'part', place: 'North/Alder', on: '2031-05-01' });
    expect(parts.map((part) => [part.place, part.basisPoints])).toEqual([
      ['', 100],
      ['North', 687.5],
      ['North/Alder', 50],
    ]);
  });

  it('does not depend on the order of the rows', () => {
    const where = { kind: 'part', place: 'North/Alder', on: '2031-05-01' } as const;
    expect(rateFor([...rates].reverse(), where).basisPoints).toBe(837.5);
  });

  it('adds decimals exactly', () => {
    const tenths = [0.1, 0.2].map((basisPoints, i) => ({
      place: i ? 'North' : '',
      kind: 'part' as const,
      basisPoints,
      validFrom: '2030-01-01',
    }));
    expect(rateFor(tenths, { kind: 'part', place: 'North', on: '2031-01-01' }).basisPoints).toBe(
      0.3,
    );
  });
});

describe('isExempt', () => {
  const certificate: Exemption = { from: '2031-01-01', until: '2031-12-31', kinds: ['part'] };

  it.each([
    ['part', '2031-01-01', true],
    ['part', '2031-12-31', true],
    ['part', '2032-01-01', false],
    ['part', '2030-12-31', false],
    ['labour', '2031-06-01', false],
  ] as const)('%s on %s: %p', (kind, on, exempt) => {
    expect(isExempt(certificate, { kind, on })).toBe(exempt);
  });

  it('without dates or kinds holds always, and without a certificate never', () => {
    const open = { from: null, until: null, kinds: null };
    expect(isExempt(open, { kind: 'trip', on: '2031-06-01' })).toBe(true);
    expect(isExempt(null, { kind: 'trip', on: '2031-06-01' })).toBe(false);
  });
});

describe('tax by line or by invoice', () => {
  const threeLines = [1, 2, 3].map(() => ({ amount: 10_05, basisPoints: 750 }));

  it('rounds every line for itself, or all of a rate once', () => {
    // 0.75375 a line; 2.26125 in all.
    expect(taxByLine(threeLines, 'line')).toEqual([75, 75, 75]);
    expect(taxByLine(threeLines, 'invoice')).toEqual([76, 75, 75]);
  });

  it('mirrors a credit', () => {
    const credits = threeLines.map((line) => ({ ...line, amount: -line.amount }));
    expect(taxByLine(credits, 'invoice')).toEqual([-76, -75, -75]);
    expect(taxOn(-10, 500)).toBe(-1);
  });

  it('refuses a rate that is negative or finer than a thousandth of a basis point', () => {
    expect(() => taxOn(100, -1)).toThrow(RangeError);
    expect(() => taxOn(100, 1.00001)).toThrow(RangeError);
    expect(() => taxOn(100, Number.NaN)).toThrow(RangeError);
  });

  const lines = fc.array(
    fc.record({
      amount: fc.integer({ min: -1_000_000, max: 1_000_000 }),
      basisPoints: fc.constantFrom(0, 500, 825, 887.5, 2500),
    }),
    { maxLength: 30 },
  );

  it('by invoice, the lines of a rate add up to the tax on their sum', () => {
    fc.assert(
      fc.property(lines, (all) => {
        const taxes = taxByLine(all, 'invoice');
        for (const rate of new Set(all.map((line) => line.basisPoints))) {
          const base = all.reduce((a, l) => a + (l.basisPoints === rate ? l.amount : 0), 0);
          const tax = all.reduce((a, l, i) => a + (l.basisPoints === rate ? taxes[i]! : 0), 0);
          expect(tax).toBe(taxOn(base, rate));
        }
      }),
    );
  });
});
