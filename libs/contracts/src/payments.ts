import { z } from 'zod';
import { listOf, listQuery } from './lists';
import { defineOperations } from './operation';
import { id, words } from './text';
import { amount, day, instant, signedAmount, version } from './values';

export const paymentMethod = z.enum(['card', 'transfer', 'cheque', 'cash']);
export const paymentState = z.enum(['asked', 'succeeded', 'failed', 'expired']);
const positiveAmount = amount.min(1);

export const paymentItem = z.object({
  id,
  /** Given once the money is there. */
  number: z.int().nullable(),
  clientId: id,
  clientName: z.string(),
  storeId: id,
  storeName: z.string(),
  method: paymentMethod,
  state: paymentState,
  amount: positiveAmount,
  currency: z.string(),
  /** The trade day it counts from. */
  receivedOn: day.nullable(),
  /** The statement it was meant for; what it settled is in `allocations`. */
  statementId: id.nullable(),
  words: z.string(),
  problem: z.string().nullable(),
  refunded: signedAmount,
  createdAt: instant,
  version,
});

export const paymentShown = paymentItem.extend({
  allocations: z.array(
    z.object({
      statementId: id,
      statementName: z.string(),
      month: z.string(),
      amount: signedAmount,
    }),
  ),
  /** What is left of it for statements to come. */
  credit: signedAmount,
  /** The store's balance now. */
  balance: signedAmount,
  refunds: z.array(z.object({ id, on: day, amount: positiveAmount, words: z.string() })),
});

const paymentParams = z.strictObject({ paymentId: id });

export const paymentOperations = defineOperations({
  'payments.list': {
    method: 'GET',
    path: '/api/payments',
    summary: 'Payments, newest first',
    permission: 'payments.read',
    query: listQuery({
      sort: ['-createdAt'],
      filters: {
        clientId: id.optional(),
        storeId: id.optional(),
        statementId: id.optional(),
        method: paymentMethod.optional(),
        state: paymentState.optional(),
      },
    }),
    answer: listOf(paymentItem),
  },
  'payments.show': {
    method: 'GET',
    path: '/api/payments/:paymentId',
    summary: 'A payment and what it settled',
    permission: 'payments.read',
    params: paymentParams,
    answer: paymentShown,
  },
  'payments.record': {
    method: 'POST',
    path: '/api/payments',
    summary: 'Record money that came by transfer, cheque or in cash',
    permission: 'payments.record',
    body: z.strictObject({
      storeId: id,
      method: z.enum(['transfer', 'cheque', 'cash']),
      amount: positiveAmount,
      receivedOn: day,
      words: words(200).default(''),
    }),
    answer: paymentShown,
    problems: ['not-found'],
  },
  'payments.startCard': {
    method: 'POST',
    path: '/api/payments/card',
    summary: 'Begin paying by card; answers where to enter the card',
    permission: 'payments.pay',
    // Asking again for the same store, statement and amount gives the same page, not a second one.
    idempotency: 'natural',
    body: z
      .strictObject({
        /** Pays this statement and what is open before it. */
        statementId: id.optional(),
        /** Pays the whole balance of a store. */
        storeId: id.optional(),
        /** A part of it; by default all. */
        amount: positiveAmount.optional(),
      })
      .refine((b) => (b.statementId === undefined) !== (b.storeId === undefined), {
        error: 'names either a statement or a store',
        path: ['statementId'],
      }),
    /**
     * After the card page the browser comes back to `/client/payments/:paymentId`, with
     * `?cancelled=1` when the person turned back.
     */
    answer: z.object({ paymentId: id, url: z.string() }),
    problems: ['conflict', 'card-payment-failed', 'not-found'],
  },
  'payments.check': {
    method: 'POST',
    path: '/api/payments/:paymentId/check',
    summary: 'Ask the card payment service how a card payment ended, without waiting for its word',
    permission: 'payments.pay',
    idempotency: 'natural',
    params: paymentParams,
    answer: paymentShown,
    status: 200,
    problems: ['card-payment-failed'],
  },
  'payments.connection': {
    method: 'GET',
    path: '/api/card-account',
    summary: 'Whether the shop takes cards, and on which account',
    permission: 'settings.read',
    answer: z.object({ connected: z.boolean(), account: z.string().nullable() }),
  },
  'payments.connect': {
    method: 'POST',
    path: '/api/card-account',
    summary: 'Connect the shop to the card payment service',
    permission: 'settings.change',
    idempotency: 'natural',
    answer: z.object({ connected: z.boolean(), account: z.string().nullable() }),
    status: 200,
    problems: ['card-payment-failed'],
  },
});
