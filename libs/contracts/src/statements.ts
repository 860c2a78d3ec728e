import { z } from 'zod';
import { bearer, deliveryState, jobResult, lineKind, machineKind } from './enums';
import { listOf, listQuery } from './lists';
import { defineOperations } from './operation';
import { id } from './text';
import { day, instant, month, signedAmount } from './values';

export const statementState = z.enum(['open', 'overdue', 'paid']);

export const statementItem = z.object({
  id,
  number: z.int(),
  /** The number as people say it: `S-0142`. */
  name: z.string(),
  storeId: id,
  storeName: z.string(),
  clientId: id,
  clientName: z.string(),
  month,
  issuedOn: day,
  dueOn: day,
  currency: z.string(),
  opening: signedAmount,
  charged: signedAmount,
  tax: signedAmount,
  paid: signedAmount,
  borneByShop: signedAmount,
  closing: signedAmount,
  /** What of this month's own charges is not paid yet. */
  open: signedAmount,
  state: statementState,
  /** False for the moments until the PDF is rendered. */
  pdfReady: z.boolean(),
});

const statementLine = z.object({
  kind: z.enum(['ticket', 'fee', 'late_charge', 'credit_note', 'payment', 'refund', 'write_off']),
  id,
  date: day,
  reference: z.string(),
  words: z.string(),
  machines: z.array(z.string()),
  list: signedAmount,
  charged: signedAmount,
  tax: signedAmount,
  /** Its effect on the balance: payments are below zero. */
  total: signedAmount,
  borneByShop: signedAmount,
});

/** A priced line of a visit, as the client may see it: no costs of the shop. */
const visitLine = z.object({
  kind: lineKind,
  description: z.string(),
  bearer,
  list: signedAmount,
  charged: signedAmount,
});

/** One visit as it stands on the statement, a snapshot like all of it. */
export const statedVisit = z.object({
  ticketId: id,
  ticketNumber: z.int(),
  visitId: id,
  date: day,
  /** One sentence: `Put right. A-01 had nothing wrong.` */
  words: z.string(),
  charged: signedAmount,
  tax: signedAmount,
  borneByShop: signedAmount,
  /** What belongs to no machine, as a whole trip. */
  lines: z.array(visitLine),
  jobs: z.array(
    z.object({
      jobId: id,
      machineId: id,
      bay: z.string(),
      kind: machineKind,
      model: z.string(),
      reported: z.string(),
      found: z.string(),
      done: z.string(),
      result: jobResult.nullable(),
      testCoins: z.int(),
      testAmount: signedAmount,
      borneByShop: signedAmount,
      lines: z.array(visitLine),
    }),
  ),
});
export type StatedVisit = z.infer<typeof statedVisit>;

export const statementShown = statementItem.extend({
  /** Creditor reference for the payer's bank (ISO 11649), in groups of four. */
  reference: z.string(),
  shopName: z.string(),
  lines: z.array(statementLine),
  visits: z.array(statedVisit),
  sums: z.object({
    list: signedAmount,
    charged: signedAmount,
    tax: signedAmount,
    total: signedAmount,
    borneByShop: signedAmount,
    credited: signedAmount,
    paid: signedAmount,
  }),
  /** The figures proved again when it is shown. */
  checks: z.array(z.object({ words: z.string(), holds: z.boolean() })),
  /** What paying this statement and all before it takes now; 0 or less: nothing is to be paid. */
  toPay: signedAmount,
  /** Whether the shop takes cards. */
  cardPossible: z.boolean(),
  /** To whom it was mailed; the office only, empty for the client. */
  deliveries: z.array(
    z.object({
      id,
      recipient: z.string(),
      state: deliveryState,
      sentAt: instant.nullable(),
      error: z.string().nullable(),
    }),
  ),
});

const statementParams = z.strictObject({ statementId: id });

export const statementOperations = defineOperations({
  'statements.list': {
    method: 'GET',
    path: '/api/statements',
    summary: 'Statements, newest month first',
    permission: 'statements.read',
    query: listQuery({
      sort: ['-month', 'month', 'dueOn', '-number'],
      filters: {
        clientId: id.optional(),
        storeId: id.optional(),
        month: month.optional(),
        runId: id.optional(),
        state: statementState.optional(),
      },
    }),
    answer: listOf(statementItem),
  },
  'statements.show': {
    method: 'GET',
    path: '/api/statements/:statementId',
    summary: 'A statement with its visits in plain words',
    permission: 'statements.read',
    params: statementParams,
    answer: statementShown,
  },
  'statements.pdf': {
    method: 'GET',
    path: '/api/statements/:statementId/pdf',
    summary: 'A statement as a PDF',
    permission: 'statements.read',
    params: statementParams,
    answerType: 'application/pdf',
    problems: ['conflict'],
  },
  'statements.mail': {
    method: 'POST',
    path: '/api/statements/:statementId/mail',
    summary: 'Mail a statement to contacts who have not been sent it, as after one was added',
    permission: 'statements.close',
    params: statementParams,
    answer: z.object({ added: z.int() }),
    status: 200,
    problems: ['conflict'],
  },
});
