import { z } from 'zod';
import { listOf, listQuery } from './lists';
import { defineOperations } from './operation';
import { id } from './text';
import { day, signedAmount } from './values';

/** What a store owes. Minor units; below zero is a credit. */
export const storeBalance = z.object({
  storeId: id,
  storeName: z.string(),
  clientId: id,
  clientName: z.string(),
  currency: z.string(),
  /** On statements and not paid. */
  balance: signedAmount,
  /** Of that, past its due date. */
  overdue: signedAmount,
  /** The earliest due date of what is open. */
  dueOn: day.nullable(),
  /** Work signed off that stands on no statement yet. */
  unbilled: signedAmount,
  lastStatementId: id.nullable(),
  lastStatementMonth: z.string().nullable(),
  lastPaidOn: day.nullable(),
  lastPaid: signedAmount.nullable(),
  /** Whether the shop takes cards. */
  cardPossible: z.boolean(),
});

const buckets = {
  current: signedAmount,
  days1To30: signedAmount,
  days31To60: signedAmount,
  days61To90: signedAmount,
  over90: signedAmount,
  /** Paid ahead and not used up; at most zero. */
  credit: signedAmount,
  total: signedAmount,
};

export const ageingRow = z.object({
  storeId: id,
  storeName: z.string(),
  clientId: id,
  clientName: z.string(),
  ...buckets,
});

export const receivableOperations = defineOperations({
  'balances.list': {
    method: 'GET',
    path: '/api/balances',
    summary: 'What each store owes now',
    permission: 'statements.read',
    query: listQuery({
      sort: ['store'],
      filters: { clientId: id.optional(), storeId: id.optional() },
    }),
    answer: listOf(storeBalance),
  },
  'receivables.list': {
    method: 'GET',
    path: '/api/receivables',
    summary: 'Open balances by days overdue',
    permission: 'ledger.read',
    query: listQuery({
      sort: ['-overdue', '-total', 'store'],
      filters: {
        clientId: id.optional(),
        /** Only stores that owe something past its due date. */
        overdue: z.enum(['true']).optional(),
      },
    }),
    answer: listOf(ageingRow).extend({
      on: day,
      currency: z.string(),
      /** Of the whole shop, whatever is filtered. */
      totals: z.object(buckets),
    }),
  },
});
