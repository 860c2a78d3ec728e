/**
 * Worked invoices of EN 16931-1, published with the rules that validate them:
 * - OpenPEPPOL, peppol-bis-invoice-3, rules/examples
 * - European Commission, eInvoicing-EN16931, ubl/examples
 * Amounts here are cents; the published ones are in whole currency.
 */
import {
  billTicket,
  brokenTotalRules,
  type DocumentLine,
  documentTotals,
  type DocumentToTotal,
  type LineKind,
  type TaxCategory,
} from '@lib/domain';

const s25: TaxCategory = { code: 'S', basisPoints: 2500 };
const s15: TaxCategory = { code: 'S', basisPoints: 1500 };
const s12: TaxCategory = { code: 'S', basisPoints: 1200 };
const exempt: TaxCategory = { code: 'E', basisPoints: 0 };
const zero: TaxCategory = { code: 'Z', basisPoints: 0 };
const outside: TaxCategory = { code: 'O', basisPoints: 0 };

function line(
  quantity: number,
  unitPrice: number,
  category: TaxCategory,
  more: Partial<DocumentLine> = {},
): DocumentLine {
  return { quantityMilli: quantity * 1000, unitPrice: unitPrice * 100, category, ...more };
}

interface Published {
  lineNets: number[];
  lines: number;
  allowances?: number;
  charges?: number;
  withoutTax: number;
  tax: number;
  withTax: number;
  payable: number;
  /** Base and tax by category, in the order of the document. */
  categories: [number, number][];
}

const invoices: [name: string, document: DocumentToTotal, published: Published][] = [
  [
    'peppol base-example',
    {
      lines: [line(7, 400, s25), line(-3, 500, s25)],
      charges: [{ amount: 25_00, category: s25 }],
    },
    {
      lineNets: [2800_00, -1500_00],
      lines: 1300_00,
      charges: 25_00,
      withoutTax: 1325_00,
      tax: 331_25,
      withTax: 1656_25,
      payable: 1656_25,
      categories: [[1325_00, 331_25]],
    },
  ],
  [
    'peppol base-negative-inv-correction',
    {
      lines: [line(-7, 400, s25), line(3, 500, s25)],
      charges: [{ amount: -25_00, category: s25 }],
    },
    {
      lineNets: [-2800_00, 1500_00],
      lines: -1300_00,
      charges: -25_00,
      withoutTax: -1325_00,
      tax: -331_25,
      withTax: -1656_25,
      payable: -1656_25,
      categories: [[-1325_00, -331_25]],
    },
  ],
  [
    'peppol Vat-category-S',
    {
      lines: [line(10, 400, s25), line(10, 200, s15), line(10, 90, s25)],
      charges: [{ amount: 200_00, category: s25 }],
      allowances: [{ amount: 100_00, category: s25 }],
    },
    {
      lineNets: [4000_00, 2000_00, 900_00],
      lines: 6900_00,
      allowances: 100_00,
      charges: 200_00,
      withoutTax: 7000_00,
      tax: 1550_00,
      withTax: 8550_00,
      payable: 8550_00,
      categories: [
        [5000_00, 1250_00],
        [2000_00, 300_00],
      ],
    },
  ],
  [
    'peppol Allowance-example',
    {
      lines: [
        line(10, 410, s25, { charges: [1_00], allowances: [101_00] }),
        line(10, 200, exempt, { priceBaseMilli: 2_000 }),
        line(10, 100, s25, { charges: [1_00], allowances: [101_00] }),
      ],
      charges: [{ amount: 200_00, category: s25 }],
      allowances: [{ amount: 200_00, category: s25 }],
      prepaid: 1000_00,
    },
    {
      lineNets: [4000_00, 1000_00, 900_00],
      lines: 5900_00,
      allowances: 200_00,
      charges: 200_00,
      withoutTax: 5900_00,
      tax: 1225_00,
      withTax: 7125_00,
      payable: 6125_00,
      categories: [
        [4900_00, 1225_00],
        [1000_00, 0],
      ],
    },
  ],
  ...[
    { category: zero, quantity: 10, unitPrice: 120, net: 1200_00 },
    { category: exempt, quantity: 10, unitPrice: 120, net: 1200_00 },
    { category: outside, quantity: 1, unitPrice: 3200, net: 3200_00 },
  ].map(({ category, quantity, unitPrice, net }): [string, DocumentToTotal, Published] => [
    `peppol vat-category-${category.code}`,
    { lines: [line(quantity, unitPrice, category)] },
    {
      lineNets: [net],
      lines: net,
      withoutTax: net,
      tax: 0,
      withTax: net,
      payable: net,
      categories: [[net, 0]],
    },
  ]),
  [
    // 1460.50 at 25 % is 365.125: published as 365.13, the half rounded up. The first line states
    // 2 at 1273.00 and a net of 1273.00; its price is taken as that of two.
    'EN 16931 guide-example2',
    {
      lines: [
        line(2, 1273, s25, { priceBaseMilli: 2_000, allowances: [12_00], charges: [12_00] }),
        line(-1, 3.96, s15, { unitPrice: 3_96 }),
        line(2, 2.48, s15, { unitPrice: 2_48 }),
        line(-1, 25, exempt),
        line(250, 0.75, s25, { unitPrice: 75 }),
      ],
      allowances: [{ amount: 100_00, category: s25 }],
      charges: [{ amount: 100_00, category: s25 }],
      prepaid: 1000_00,
    },
    {
      lineNets: [1273_00, -3_96, 4_96, -25_00, 187_50],
      lines: 1436_50,
      allowances: 100_00,
      charges: 100_00,
      withoutTax: 1436_50,
      tax: 365_28,
      withTax: 1801_78,
      payable: 801_78,
      categories: [
        [1460_50, 365_13],
        [1_00, 15],
        [-25_00, 0],
      ],
    },
  ],
  [
    'EN 16931 ubl-tc434-example4',
    { lines: [line(1000, 1, s25), line(100, 5, s25), line(500, 5, s12)] },
    {
      lineNets: [1000_00, 500_00, 2500_00],
      lines: 4000_00,
      withoutTax: 4000_00,
      tax: 675_00,
      withTax: 4675_00,
      payable: 4675_00,
      categories: [
        [1500_00, 375_00],
        [2500_00, 300_00],
      ],
    },
  ],
];

describe('documentTotals', () => {
  it.each(invoices)('%s', (_, document, published) => {
    const totals = documentTotals(document);
    const { categories, ...figures } = published;
    expect(totals).toMatchObject({ allowances: 0, charges: 0, ...figures });
    expect(totals.categories.map(({ base, tax }) => [base, tax])).toEqual(categories);
    expect(brokenTotalRules(totals)).toEqual([]);
  });
});

/** The same amounts as lines of a ticket, allowances and charges of the document among them. */
function ticketOf(document: DocumentToTotal, lineNets: readonly number[]) {
  const { lines, allowances = [], charges = [] } = document;
  const amounts = [
    ...lines.map(({ category }, i) => ({ amount: lineNets[i] ?? 0, category })),
    ...allowances.map(({ amount, category }) => ({ amount: -amount, category })),
    ...charges,
  ];
  // A ticket is taxed by the kind of its lines: one kind stands for each category.
  const kinds: LineKind[] = ['trip', 'labour', 'access', 'part'];
  const codes = [...new Set(amounts.map(({ category }) => category))];
  const kindOf = (category: TaxCategory) => kinds[codes.indexOf(category)] as LineKind;
  return billTicket({
    lines: amounts.map(({ amount, category }) => ({
      kind: kindOf(category),
      bearer: 'store' as const,
      list: amount,
      cost: 0,
    })),
    taxRates: codes.map((category) => ({
      place: '',
      kind: kindOf(category),
      basisPoints: category.basisPoints,
      validFrom: '2000-01-01',
    })),
    place: '',
    on: '2031-05-15',
    exemption: null,
    rounding: 'invoice',
  });
}

describe('a ticket, taxed by invoice', () => {
  it.each(invoices)('%s', (_, document, published) => {
    const { lines, totals } = ticketOf(document, published.lineNets);
    expect(totals).toMatchObject({
      net: published.withoutTax,
      tax: published.tax,
      total: published.withTax,
    });
    const taxed = (pairs: readonly (readonly [number, number])[]) =>
      pairs.filter(([, tax]) => tax !== 0);
    expect(taxed(totals.categories.map(({ base, tax }) => [base, tax] as const))).toEqual(
      taxed(published.categories),
    );
    expect(lines.reduce((sum, line) => sum + line.tax, 0)).toBe(published.tax);
  });
});
