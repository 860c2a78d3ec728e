import { feePostings } from './charge-postings';
import { journalText } from './journal-text';
import { type LedgerDocument } from './posting';
import { paymentPostings } from './settlement-postings';

const storeId = 'suds';
const fee: LedgerDocument = {
  kind: 'fee',
  reference: 'C-0007/2026-03',
  date: '2026-03-31',
  postings: feePostings({ storeId, charged: 9900, tax: 5 }),
};
const payment: LedgerDocument = {
  kind: 'payment',
  reference: 'P-0001',
  date: '2026-04-02',
  postings: paymentPostings({ storeId, amount: 9905, method: 'card' }),
};

describe('the exported journal', () => {
  it('writes each document as one transaction', () => {
    const names = { currency: 'USD', storeName: () => 'Suds;  Main (north)' };
    expect(journalText([fee, payment], names)).toBe(`2026-03-31 (C-0007/2026-03) fee
    assets:unbilled:Suds Main north  99.05 USD
    revenues:revenue_contract:Suds Main north  -99.00 USD
    liabilities:tax_payable:Suds Main north  -0.05 USD

2026-04-02 (P-0001) payment
    assets:card_clearing:Suds Main north  99.05 USD
    assets:receivable:Suds Main north  -99.05 USD
`);
  });

  it('knows currencies without and with three decimals', () => {
    expect(journalText([payment], { currency: 'JPY' })).toContain('suds  9905 JPY');
    expect(journalText([payment], { currency: 'KWD' })).toContain('suds  -9.905 KWD');
  });

  it('foots to zero when its figures are read back', () => {
    const text = journalText([fee, payment], { currency: 'USD' });
    const figures = [...text.matchAll(/ {2}(-?)(\d+)\.(\d\d) USD$/gm)];
    expect(figures).toHaveLength(5);
    const cents = figures.map(([, sign, whole, part]) => Number(`${sign}${whole}${part}`));
    expect(cents.reduce((sum, each) => sum + each, 0)).toBe(0);
  });

  it('exports no document that does not balance', () => {
    const torn = { ...payment, postings: payment.postings.slice(1) };
    expect(() => journalText([torn], { currency: 'USD' })).toThrow(/not to zero/);
  });

  it('is empty without documents', () => {
    expect(journalText([], { currency: 'USD' })).toBe('');
  });
});
