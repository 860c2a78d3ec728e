import fc from 'fast-check';
import { brokenTotalRules } from './broken-rules';
import { documentTotals, lineNet } from './document-totals';

const standard = { code: 'S', basisPoints: 2500 };
const zero = { code: 'Z', basisPoints: 0 };

describe('documentTotals', () => {
  it('prices by the base quantity and rounds the line once', () => {
    const minutes = { quantityMilli: 20_000, unitPrice: 100_00, priceBaseMilli: 60_000 };
    expect(lineNet({ ...minutes, category: standard })).toBe(33_33);
    expect(lineNet({ ...minutes, allowances: [33], charges: [5], category: standard })).toBe(33_05);
    expect(() => lineNet({ ...minutes, priceBaseMilli: 0, category: standard })).toThrow(
      RangeError,
    );
  });

  it('keeps the same code at two rates apart, and puts an empty document at nothing', () => {
    const { categories } = documentTotals({
      lines: [
        { quantityMilli: 1000, unitPrice: 100, category: standard },
        { quantityMilli: 1000, unitPrice: 100, category: { code: 'S', basisPoints: 1500 } },
        { quantityMilli: 1000, unitPrice: 100, category: zero },
      ],
    });
    expect(categories.map(({ base, tax }) => [base, tax])).toEqual([
      [100, 25],
      [100, 15],
      [100, 0],
    ]);
    expect(documentTotals({ lines: [] })).toMatchObject({ payable: 0, categories: [] });
  });

  it('takes off what was paid and adds what rounds the payment', () => {
    const totals = documentTotals({
      lines: [{ quantityMilli: 1000, unitPrice: 99_97, category: zero }],
      prepaid: 50_00,
      rounding: 3,
    });
    expect(totals).toMatchObject({ withTax: 99_97, payable: 50_00 });
  });

  const cents = fc.integer({ min: -100_000, max: 100_000 });
  const category = fc.constantFrom(standard, zero, { code: 'S', basisPoints: 887.5 });
  const adjustment = fc.record({ amount: cents, category });
  const document = fc.record({
    lines: fc.array(
      fc.record({
        quantityMilli: fc.integer({ min: -50_000, max: 50_000 }),
        unitPrice: fc.nat(1_000_000),
        priceBaseMilli: fc.constantFrom(1, 1_000, 3_000, 60_000),
        allowances: fc.array(cents, { maxLength: 2 }),
        charges: fc.array(cents, { maxLength: 2 }),
        category,
      }),
      { maxLength: 20 },
    ),
    allowances: fc.array(adjustment, { maxLength: 3 }),
    charges: fc.array(adjustment, { maxLength: 3 }),
    prepaid: cents,
    rounding: cents,
  });

  it('breaks none of the rules', () => {
    fc.assert(
      fc.property(document, (any) => expect(brokenTotalRules(documentTotals(any))).toEqual([])),
    );
  });
});

describe('brokenTotalRules', () => {
  const good = documentTotals({
    lines: [{ quantityMilli: 1000, unitPrice: 100_00, category: standard }],
  });

  it.each([
    ['lines', ['BR-CO-10', 'BR-CO-13']],
    ['withoutTax', ['BR-CO-13', 'BR-S-08', 'BR-CO-15']],
    ['tax', ['BR-CO-14', 'BR-CO-15']],
    ['withTax', ['BR-CO-15', 'BR-CO-16']],
    ['payable', ['BR-CO-16']],
  ] as const)('sees one cent too much in %s', (name, rules) => {
    const broken = brokenTotalRules({ ...good, [name]: good[name] + 1 });
    expect(broken.map(({ rule }) => rule)).toEqual(rules);
  });

  it('sees a tax that is not base times rate, and says what is due', () => {
    const categories = good.categories.map((own) => ({ ...own, tax: own.tax - 1 }));
    const broken = brokenTotalRules({
      ...good,
      tax: good.tax - 1,
      withTax: good.withTax - 1,
      payable: good.payable - 1,
      categories,
    });
    expect(broken).toEqual([{ rule: 'BR-CO-17', stated: 24_99, due: 25_00 }]);
  });
});
