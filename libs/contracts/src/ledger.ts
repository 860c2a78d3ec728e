import { z } from 'zod';
import { listOf, listQuery } from './lists';
import { defineOperations } from './operation';
import { id } from './text';
import { day, instant, signedAmount } from './values';

export const accountCode = z.enum([
  'unbilled',
  'receivable',
  'revenue_trip',
  'revenue_labour',
  'revenue_parts',
  'revenue_contract',
  'revenue_late',
  'tax_payable',
  'card_clearing',
  'bank',
  'write_off',
  'absorbed_cost',
  'absorbed_offset',
]);

export const documentKind = z.enum([
  'ticket',
  'absorbed',
  'fee',
  'late_charge',
  'statement',
  'payment',
  'refund',
  'credit_note',
  'write_off',
]);

export const entry = z.object({
  id,
  postedOn: day,
  at: instant,
  documentKind,
  documentId: id,
  account: accountCode,
  /** Debit above zero, credit below; minor units. */
  amount: signedAmount,
  storeId: id.nullable(),
  storeName: z.string().nullable(),
  clientId: id.nullable(),
});

const span = { from: day.optional(), to: day.optional() };

export const ledgerOperations = defineOperations({
  'ledger.trialBalance': {
    method: 'GET',
    path: '/api/ledger/trial-balance',
    summary: 'The balance of every account; the sum is zero',
    permission: 'ledger.read',
    query: z.strictObject({ on: day.optional(), storeId: id.optional() }),
    answer: z.object({
      on: day,
      currency: z.string(),
      accounts: z.array(
        z.object({
          account: accountCode,
          group: z.enum(['assets', 'liabilities', 'revenues', 'expenses']),
          debit: signedAmount,
          credit: signedAmount,
          balance: signedAmount,
        }),
      ),
      total: signedAmount,
    }),
  },
  'ledger.entries': {
    method: 'GET',
    path: '/api/ledger/entries',
    summary: 'Entries, newest first',
    permission: 'ledger.read',
    query: listQuery({
      sort: ['-postedOn', 'postedOn'],
      filters: {
        ...span,
        account: accountCode.optional(),
        documentKind: documentKind.optional(),
        documentId: id.optional(),
        storeId: id.optional(),
        clientId: id.optional(),
      },
    }).omit({ q: true }),
    answer: listOf(entry),
  },
  'ledger.journal': {
    method: 'GET',
    path: '/api/ledger/journal',
    summary: 'The books as a plain-text journal that other accounting programs read',
    permission: 'ledger.read',
    query: z.strictObject(span),
    answerType: 'text/plain',
  },
});
