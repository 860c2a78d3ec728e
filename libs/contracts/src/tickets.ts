import { z } from 'zod';
import { bearer, cause, jobResult, lineKind, machineKind } from './enums';
import { listOf, listQuery } from './lists';
import { defineOperations } from './operation';
import { rulingReason } from './rulings';
import { id } from './text';
import { day, instant, signedAmount } from './values';

export const ticketItem = z.object({
  id,
  number: z.int(),
  /** The number as people say it: `T-0142`. */
  name: z.string(),
  visitId: id,
  visitNumber: z.int(),
  store: z.object({ id, name: z.string() }),
  client: z.object({ id, name: z.string() }),
  /** The trade day of the work. */
  workedOn: day,
  signedOffOn: day,
  currency: z.string(),
  /** What all of it is worth; without tax. */
  list: signedAmount,
  /** What the store is charged, without tax. */
  net: signedAmount,
  tax: signedAmount,
  total: signedAmount,
  /** List value of what the shop bore: its mistakes, its warranty, goodwill. */
  borneByShop: signedAmount,
  /** What that cost the shop itself; null for people of the client. */
  ownCost: signedAmount.nullable(),
});

export const ticketLine = z.object({
  position: z.int(),
  jobId: id.nullable(),
  lineKey: z.string(),
  kind: lineKind,
  description: z.string(),
  unit: z.enum(['each', 'minute']),
  quantityMilli: z.int(),
  /** For one piece, or for 60 minutes. */
  unitPrice: signedAmount,
  discount: signedAmount,
  bearer,
  list: signedAmount,
  charged: signedAmount,
  taxBasisPoints: z.number(),
  tax: signedAmount,
  /** How the figure came about. */
  priceReasons: z.array(z.string()),
  /** The shop's own; null for people of the client. */
  shop: z
    .object({
      cost: signedAmount,
      reasons: z.array(rulingReason),
      decision: z.object({ by: z.string(), why: z.string() }).nullable(),
    })
    .nullable(),
});

const ticketJob = z.object({
  jobId: id,
  position: z.int(),
  machine: z.object({
    id,
    bay: z.string(),
    kind: machineKind,
    make: z.string(),
    model: z.string(),
  }),
  finding: z.string(),
  cause: cause.nullable(),
  action: z.string(),
  result: jobResult.nullable(),
  lines: z.array(ticketLine),
});

const sums = z.object({
  list: signedAmount,
  net: signedAmount,
  tax: signedAmount,
  total: signedAmount,
  /** List value by who bears it, other than the store. */
  absorbed: z.object({
    shop: signedAmount,
    supplier: signedAmount,
    contract: signedAmount,
    goodwill: signedAmount,
  }),
  borneByShop: signedAmount,
});

export const ticketShown = ticketItem.extend({
  signedOffAt: instant,
  signedOffBy: z.string().nullable(),
  receivedBy: z.string().nullable(),
  edition: z.object({ id, number: z.int() }).nullable(),
  jobs: z.array(ticketJob),
  absorbed: sums.shape.absorbed,
  /** True once the own cost of what the shop bore is in its books; null for people of the client. */
  absorbedPosted: z.boolean().nullable(),
});

/** What the ticket would say if it were signed off now. */
export const ticketPreview = sums.extend({
  visitId: id,
  visitNumber: z.int(),
  currency: z.string(),
  jobs: z.array(ticketJob),
  /** What keeps it from being signed off, in plain words; empty when nothing does. */
  blockers: z.array(z.string()),
});

const visitParams = z.strictObject({ visitId: id });

export const ticketOperations = defineOperations({
  'tickets.preview': {
    method: 'GET',
    path: '/api/visits/:visitId/ticket-preview',
    summary: 'What the ticket of a visit would say if it were signed off now',
    permission: 'tickets.sign_off',
    params: visitParams,
    answer: ticketPreview,
    problems: ['conflict'],
  },
  'tickets.signOff': {
    method: 'POST',
    path: '/api/visits/:visitId/ticket',
    summary: 'Sign off the ticket of a completed visit; it is never changed afterwards',
    permission: 'tickets.sign_off',
    params: visitParams,
    body: z.strictObject({
      /** The total that was looked at: another one by now is refused. */
      total: signedAmount.optional(),
    }),
    answer: ticketShown,
    problems: ['conflict'],
  },
  'tickets.list': {
    method: 'GET',
    path: '/api/tickets',
    summary: 'Tickets, newest first',
    permission: 'tickets.read',
    query: listQuery({
      sort: ['-signedOffOn'],
      filters: {
        clientId: id.optional(),
        storeId: id.optional(),
        from: day.optional(),
        until: day.optional(),
        /** Only those of which somebody other than the store bears a line. */
        absorbed: z.enum(['shop', 'supplier', 'contract', 'goodwill']).optional(),
      },
    }),
    answer: listOf(ticketItem),
  },
  'tickets.show': {
    method: 'GET',
    path: '/api/tickets/:ticketId',
    summary: 'One ticket, line by line',
    permission: 'tickets.read',
    params: z.strictObject({ ticketId: id }),
    answer: ticketShown,
  },
});
