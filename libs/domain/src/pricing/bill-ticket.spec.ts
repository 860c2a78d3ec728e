import fc from 'fast-check';
import { type TaxRate } from '../tax/rate';
import { type Bearer, BEARERS, type LineKind } from '../words/trade';
import { billTicket, type LineToBill } from './bill-ticket';

const taxRates: TaxRate[] = [
  { place: 'North', kind: 'part', basisPoints: 825, validFrom: '2030-01-01' },
  { place: 'North', kind: 'trip', basisPoints: 500, validFrom: '2030-01-01' },
];
const base = { taxRates, place: 'North', on: '2031-05-06', exemption: null };

function line(kind: LineKind, bearer: Bearer, list: number, cost = 0): LineToBill {
  return { kind, bearer, list, cost };
}

describe('billTicket', () => {
  const lines = [
    line('trip', 'store', 31_67, 6_67),
    line('labour', 'store', 42_00, 10_80),
    line('part', 'store', 32_00, 21_33),
    line('trip', 'shop', 31_66, 6_66),
    line('part', 'shop', 64_00, 30_00),
    line('part', 'supplier', 20_00, 9_00),
    line('labour', 'contract', 15_00, 5_00),
    line('access', 'goodwill', 10_00, 3_00),
  ];

  it('charges the store’s lines, and lets the others stand at their list value', () => {
    const { lines: billed, totals } = billTicket({ ...base, lines, rounding: 'line' });
    expect(billed.map(({ charged, tax }) => [charged, tax])).toEqual([
      [31_67, 1_58],
      [42_00, 0],
      [32_00, 2_64],
      ...[1, 2, 3, 4, 5].map(() => [0, 0]),
    ]);
    expect(totals).toEqual({
      list: 246_33,
      absorbed: { shop: 95_66, supplier: 20_00, contract: 15_00, goodwill: 10_00 },
      absorbedCost: { shop: 36_66, supplier: 9_00, contract: 5_00, goodwill: 3_00 },
      net: 105_67,
      tax: 4_22,
      total: 109_89,
      categories: [
        { code: 'S', basisPoints: 500, base: 31_67, tax: 1_58 },
        { code: 'Z', basisPoints: 0, base: 42_00, tax: 0 },
        { code: 'S', basisPoints: 825, base: 32_00, tax: 2_64 },
      ],
    });
  });

  it('keeps whatever else a line carries', () => {
    const [first] = billTicket({
      ...base,
      lines: [{ ...line('trip', 'store', 100), lineKey: 'job:1:trip' }],
      rounding: 'line',
    }).lines;
    expect(first?.lineKey).toBe('job:1:trip');
  });

  it('taxes no line of an exempt client, and only the kinds it is exempt for', () => {
    const exemption = { from: null, until: null, kinds: ['part' as const] };
    const { totals } = billTicket({ ...base, lines, exemption, rounding: 'invoice' });
    expect(totals.tax).toBe(1_58);
    expect(totals.categories).toContainEqual({ code: 'E', basisPoints: 0, base: 32_00, tax: 0 });
  });

  const anyLines = fc.array(
    fc.record({
      kind: fc.constantFrom<LineKind>('trip', 'labour', 'access', 'part'),
      bearer: fc.constantFrom(...BEARERS),
      list: fc.nat(1_000_000),
      cost: fc.nat(1_000_000),
    }),
    { maxLength: 40 },
  );

  it.each(['line', 'invoice'] as const)('foots to the cent, rounded by %s', (rounding) => {
    fc.assert(
      fc.property(anyLines, (any) => {
        const { lines: billed, totals } = billTicket({ ...base, lines: any, rounding });
        const total = (amounts: number[]) => amounts.reduce((a, b) => a + b, 0);
        expect(totals.net).toBe(total(billed.map((each) => each.charged)));
        expect(totals.tax).toBe(total(billed.map((each) => each.tax)));
        expect(totals.total).toBe(totals.net + totals.tax);
        expect(totals.list).toBe(totals.net + total(Object.values(totals.absorbed)));
        expect(total(totals.categories.map((each) => each.base))).toBe(totals.net);
        expect(total(totals.categories.map((each) => each.tax))).toBe(totals.tax);
      }),
    );
  });
});
