import * as fc from 'fast-check';
import { type LineKind } from '../words/trade';
import {
  type TicketForPosting,
  absorbedPostings,
  creditNotePostings,
  feePostings,
  lateChargePostings,
  ticketPostings,
} from './charge-postings';
import { type Posting, balanced, gathered, reversed } from './posting';
import {
  type PaymentMethod,
  paymentPostings,
  refundPostings,
  statementPostings,
  writeOffPostings,
} from './settlement-postings';
import { openBalance, trialBalance } from './trial-balance';

const storeId = 'suds';

describe('a signed-off ticket', () => {
  const ticket: TicketForPosting = {
    storeId,
    tax: 413,
    lines: [
      { kind: 'trip', bearer: 'store', charged: 4500, ownCost: 2000 },
      { kind: 'labour', bearer: 'store', charged: 6000, ownCost: 2500 },
      { kind: 'access', bearer: 'store', charged: 1500, ownCost: 600 },
      { kind: 'part', bearer: 'store', charged: 3200, ownCost: 1900 },
      { kind: 'part', bearer: 'shop', charged: 0, ownCost: 2750 },
      { kind: 'labour', bearer: 'goodwill', charged: 0, ownCost: 500 },
      { kind: 'part', bearer: 'supplier', charged: 0, ownCost: 800 },
      { kind: 'labour', bearer: 'contract', charged: 0, ownCost: 900 },
    ],
  };

  it('charges the store its own lines', () => {
    expect(ticketPostings(ticket)).toEqual([
      { account: 'unbilled', storeId, amount: 15613 },
      { account: 'revenue_trip', storeId, amount: -4500 },
      { account: 'revenue_labour', storeId, amount: -7500 },
      { account: 'revenue_parts', storeId, amount: -3200 },
      { account: 'tax_payable', storeId, amount: -413 },
    ]);
  });

  it('keeps what the shop absorbed in a document of its own', () => {
    expect(absorbedPostings(ticket)).toEqual([
      { account: 'absorbed_cost', storeId, amount: 3250 },
      { account: 'absorbed_offset', storeId, amount: -3250 },
    ]);
  });

  it('posts nothing when all of it was free and cost nothing', () => {
    expect(ticketPostings({ storeId, lines: [], tax: 0 })).toEqual([]);
  });

  it('refuses to charge a store what somebody else bears', () => {
    const lines = [{ kind: 'part', bearer: 'shop', charged: 1, ownCost: 0 }] as const;
    expect(() => ticketPostings({ storeId, lines, tax: 0 })).toThrow(
      /must charge the store nothing/,
    );
  });
});

describe('other documents', () => {
  it('post to the accounts of the trade', () => {
    expect(feePostings({ storeId, charged: 9900, tax: 800 })).toEqual([
      { account: 'unbilled', storeId, amount: 10700 },
      { account: 'revenue_contract', storeId, amount: -9900 },
      { account: 'tax_payable', storeId, amount: -800 },
    ]);
    expect(lateChargePostings({ storeId, charged: 125 })).toEqual([
      { account: 'unbilled', storeId, amount: 125 },
      { account: 'revenue_late', storeId, amount: -125 },
    ]);
    expect(statementPostings({ storeId, amount: 10825 })).toEqual([
      { account: 'receivable', storeId, amount: 10825 },
      { account: 'unbilled', storeId, amount: -10825 },
    ]);
    expect(paymentPostings({ storeId, amount: 10825, method: 'card' })).toEqual([
      { account: 'card_clearing', storeId, amount: 10825 },
      { account: 'receivable', storeId, amount: -10825 },
    ]);
    expect(refundPostings({ storeId, amount: 25, method: 'cheque' })).toEqual([
      { account: 'receivable', storeId, amount: 25 },
      { account: 'bank', storeId, amount: -25 },
    ]);
    expect(writeOffPostings({ storeId, amount: 25 })).toEqual([
      { account: 'write_off', storeId, amount: 25 },
      { account: 'receivable', storeId, amount: -25 },
    ]);
    const lines = [{ kind: 'part', charged: 3200 }] as const;
    expect(creditNotePostings({ storeId, lines, tax: 264 })).toEqual([
      { account: 'receivable', storeId, amount: -3464 },
      { account: 'revenue_parts', storeId, amount: 3200 },
      { account: 'tax_payable', storeId, amount: 264 },
    ]);
  });

  it('refuse amounts that make no sense', () => {
    expect(() => paymentPostings({ storeId, amount: 0, method: 'cash' })).toThrow(/above zero/);
    expect(() => writeOffPostings({ storeId, amount: -5 })).toThrow(/above zero/);
    expect(() => feePostings({ storeId, charged: 99.5, tax: 0 })).toThrow(/whole number/);
    expect(() => statementPostings({ storeId, amount: Number.NaN })).toThrow(/whole number/);
  });
});

describe('balance', () => {
  it('lets no lopsided document through', () => {
    const postings: Posting[] = [{ account: 'bank', storeId, amount: 1 }];
    expect(() => balanced({ postings })).toThrow(/sum to 1/);
    expect(() => gathered(postings)).toThrow(/sum to 1/);
    const whole = { postings: [...postings, ...reversed(postings)] };
    expect(balanced(whole)).toBe(whole);
  });

  const amount = fc.integer({ min: 1, max: 1_000_000 });
  const store = fc.constantFrom('suds', 'bubbles', 'spin');
  const revenueKind = fc.constantFrom<LineKind>('trip', 'labour', 'access', 'part');
  const ticketLine = fc.oneof(
    fc.record({
      kind: revenueKind,
      bearer: fc.constant('store' as const),
      charged: fc.integer({ min: -10_000, max: 1_000_000 }),
      ownCost: fc.nat(500_000),
    }),
    fc.record({
      kind: revenueKind,
      bearer: fc.constantFrom('shop', 'supplier', 'contract', 'goodwill' as const),
      charged: fc.constant(0),
      ownCost: fc.nat(500_000),
    }),
  ) as fc.Arbitrary<TicketForPosting['lines'][number]>;
  const ticket = fc.record({
    storeId: store,
    lines: fc.array(ticketLine, { maxLength: 8 }),
    tax: fc.nat(100_000),
  });
  const method = fc.constantFrom<PaymentMethod>('card', 'cheque', 'cash', 'transfer');
  const settlement = fc.record({ storeId: store, amount, method });
  const note = fc.record({
    storeId: store,
    lines: fc.array(fc.record({ kind: revenueKind, charged: amount }), {
      minLength: 1,
      maxLength: 4,
    }),
    tax: fc.nat(10_000),
  });
  const postingsOfAnyDocument = fc.oneof(
    ticket.map(ticketPostings),
    ticket.map(absorbedPostings),
    fc.record({ storeId: store, charged: amount, tax: fc.nat(9_999) }).map(feePostings),
    fc.record({ storeId: store, charged: amount }).map(lateChargePostings),
    fc.record({ storeId: store, amount }).map(statementPostings),
    settlement.map(paymentPostings),
    settlement.map(refundPostings),
    note.map(creditNotePostings),
    fc.record({ storeId: store, amount }).map(writeOffPostings),
  );

  it('holds after any sequence of documents, for all stores and for each', () => {
    fc.assert(
      fc.property(fc.array(postingsOfAnyDocument, { maxLength: 40 }), (documents) => {
        const postings = documents.flat();
        expect(trialBalance(postings).total).toBe(0);
        let receivable = 0;
        for (const id of ['suds', 'bubbles', 'spin']) {
          expect(trialBalance(postings, id).total).toBe(0);
          receivable += openBalance(postings, id);
        }
        expect(receivable).toBe(trialBalance(postings).accounts.receivable);
        const { accounts } = trialBalance(postings);
        expect(accounts.absorbed_cost + accounts.absorbed_offset).toBe(0);
      }),
    );
  });

  it('leaves nothing unbilled once a statement has taken every ticket', () => {
    fc.assert(
      fc.property(fc.array(ticket, { maxLength: 12 }), (tickets) => {
        const work = tickets.flatMap(ticketPostings);
        const statements = ['suds', 'bubbles', 'spin'].flatMap((id) =>
          statementPostings({ storeId: id, amount: trialBalance(work, id).accounts.unbilled }),
        );
        const after = trialBalance([...work, ...statements]).accounts;
        expect(after.unbilled).toBe(0);
        expect(after.receivable).toBe(trialBalance(work).accounts.unbilled);
      }),
    );
  });
});
