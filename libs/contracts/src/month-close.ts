import { z } from 'zod';
import { runState } from './enums';
import { listOf, listQuery } from './lists';
import { defineOperations } from './operation';
import { id } from './text';
import { day, instant, month, signedAmount, version } from './values';

/** What one store's statement would say if the month were closed now. Minor units. */
export const closeStore = z.object({
  storeId: id,
  storeName: z.string(),
  clientId: id,
  clientName: z.string(),
  visits: z.int(),
  opening: signedAmount,
  /** Without tax; `charged + tax` is what the month adds. */
  charged: signedAmount,
  tax: signedAmount,
  borneByShop: signedAmount,
  paid: signedAmount,
  closing: signedAmount,
  /** What the statement before said; null for a first statement. */
  lastMonth: z
    .object({ visits: z.int(), charged: signedAmount, tax: signedAmount, closing: signedAmount })
    .nullable(),
  /** Something to look at before it is sent: charges of three times last month and more. */
  unusual: z.boolean(),
  /** People who get the statement by mail. */
  recipients: z.int(),
  /** Set once the store's statement of the month is built. */
  statementId: id.nullable(),
});

const closeTotals = z.object({
  stores: z.int(),
  visits: z.int(),
  opening: signedAmount,
  charged: signedAmount,
  tax: signedAmount,
  borneByShop: signedAmount,
  paid: signedAmount,
  closing: signedAmount,
});

const storeRef = z.object({ storeId: id, storeName: z.string(), clientId: id });

export const closePreview = z.object({
  month,
  currency: z.string(),
  /** When the schedule closes it; null when only the button does. */
  dueAt: instant.nullable(),
  /** True once the month is over in the shop's zone and no later month is closed. */
  mayClose: z.boolean(),
  run: z.object({ id, state: runState }).nullable(),
  stores: z.array(closeStore),
  totals: closeTotals,
  /** What is still open of the month; at most 50 of each are listed, `count` is all of them. */
  unfinished: z.object({
    visits: z.object({
      count: z.int(),
      items: z.array(
        storeRef.extend({ visitId: id, number: z.int(), plannedOn: day, state: z.string() }),
      ),
    }),
    rulings: z.object({
      count: z.int(),
      items: z.array(storeRef.extend({ visitId: id, number: z.int(), lines: z.int() })),
    }),
    withoutRecipient: z.object({ count: z.int(), items: z.array(storeRef) }),
  }),
});

export const runItem = z.object({
  id,
  month,
  state: runState,
  /** Who pressed the button; null when the schedule did. */
  startedBy: z.string().nullable(),
  startedAt: instant,
  finishedAt: instant.nullable(),
  stores: z.int(),
  total: signedAmount,
  version,
});

export const runShown = runItem.extend({
  problem: z.string().nullable(),
  currency: z.string(),
  /** Stores by how far they are; each store is counted once. */
  counts: z.object({ waiting: z.int(), built: z.int(), rendered: z.int(), failed: z.int() }),
  mails: z.object({
    waiting: z.int(),
    sent: z.int(),
    uncertain: z.int(),
    failed: z.int(),
    total: z.int(),
  }),
  /** Of 0 to 1, over building, rendering and mailing. */
  progress: z.number(),
  secondsLeft: z.int().nullable(),
  /** The first statements, proved again from their own figures. */
  firstChecked: z.object({ statements: z.int(), checks: z.int(), agree: z.int() }),
  /** At most 50 of each. */
  failedStores: z.array(storeRef.extend({ error: z.string() })),
  withoutRecipient: z.array(storeRef),
});

const runParams = z.strictObject({ runId: id });

export const monthCloseOperations = defineOperations({
  'statements.closePreview': {
    method: 'GET',
    path: '/api/close-preview',
    summary: 'What closing a month would state, and what of it is unfinished',
    permission: 'statements.close',
    query: z.strictObject({ month: month.optional() }),
    answer: closePreview,
  },
  'statements.close': {
    method: 'POST',
    path: '/api/closes',
    summary: 'Close a month: build and send every statement, once',
    permission: 'statements.close',
    body: z.strictObject({ month }),
    answer: runShown,
    problems: ['conflict'],
  },
  'statements.runs': {
    method: 'GET',
    path: '/api/closes',
    summary: 'Month closes, newest first',
    permission: 'statements.close',
    query: listQuery({ sort: ['-month'] }).omit({ q: true }),
    answer: listOf(runItem),
  },
  'statements.run': {
    method: 'GET',
    path: '/api/closes/:runId',
    summary: 'How far a month close is',
    permission: 'statements.close',
    params: runParams,
    answer: runShown,
  },
  'statements.hold': {
    method: 'POST',
    path: '/api/closes/:runId/hold',
    summary: 'Hold a month close: nothing more is built or mailed',
    permission: 'statements.close',
    params: runParams,
    answer: runShown,
    status: 200,
    problems: ['conflict'],
  },
  'statements.goOn': {
    method: 'POST',
    path: '/api/closes/:runId/go-on',
    summary: 'Go on with a month close that is held, or that failed for some stores',
    permission: 'statements.close',
    params: runParams,
    answer: runShown,
    status: 200,
    problems: ['conflict'],
  },
});
