import { z } from 'zod';
import {
  bearer,
  cause,
  findingCode,
  jobResult,
  lineKind,
  machineKind,
  symptom,
  warrantyMark,
} from './enums';
import { listOf, listQuery } from './lists';
import { defineOperations } from './operation';
import { id, line, words } from './text';
import { day, instant, signedAmount } from './values';

export const rulingReason = z.object({
  code: z.string(),
  /** One sentence for the owner. */
  words: z.string(),
  /** True for the reason the proposal rests on. */
  decides: z.boolean(),
});

export const outcome = z.object({
  bearer,
  /** What the store would pay, before tax. */
  charged: signedAmount,
  /** What the shop would be left with. */
  ourCost: signedAmount,
  /** What the shop would claim from its supplier. */
  claimed: signedAmount,
});

/** A priced line: what the rules propose, what was decided, and what holds. */
export const rulingLine = z.object({
  lineKey: z.string(),
  kind: lineKind,
  description: z.string(),
  unit: z.enum(['each', 'minute']),
  quantityMilli: z.int(),
  unitPrice: signedAmount,
  discount: signedAmount,
  list: signedAmount,
  cost: signedAmount,
  priceReasons: z.array(z.string()),
  proposed: z.object({
    bearer,
    needsConfirmation: z.boolean(),
    reasons: z.array(rulingReason),
  }),
  /**
   * What the proposal rests on. Sent with a decision, which is refused when the work was changed in
   * the meantime.
   */
  basis: z.string(),
  decision: z
    .object({
      step: z.enum(['confirmed', 'overruled']),
      bearer,
      why: z.string(),
      by: z.string(),
      at: instant,
    })
    .nullable(),
  /** Who bears it as things stand: by the decision, else by the proposal. */
  bearer,
  /** The owner must decide before the ticket can be signed off. */
  waiting: z.boolean(),
  /** The figures for every bearer. */
  outcomes: z.array(outcome),
});

export const rulingJob = z.object({
  jobId: id,
  position: z.int(),
  machine: z.object({ id, bay: z.string(), kind: machineKind }),
  symptom: symptom.nullable(),
  finding: z.string(),
  findingCode: findingCode.nullable(),
  category: z.string().nullable(),
  cause: cause.nullable(),
  action: z.string(),
  result: jobResult.nullable(),
  mark: warrantyMark,
  markWords: z.string(),
  markedBy: z.string(),
  causedBy: z.object({ jobId: id, reference: z.string(), words: z.string() }).nullable(),
  lines: z.array(rulingLine),
});

export const visitRulings = z.object({
  visit: z.object({
    id,
    number: z.int(),
    on: day,
    store: z.object({ id, name: z.string() }),
    client: z.object({ id, name: z.string() }),
    tech: z.string().nullable(),
    ticketId: id.nullable(),
  }),
  currency: z.string(),
  edition: z.object({ id, number: z.int() }),
  /** Lines the owner must still decide. */
  waiting: z.int(),
  jobs: z.array(rulingJob),
  totals: z.object({
    list: signedAmount,
    charged: signedAmount,
    /** List value of what each of the others bears. */
    shop: signedAmount,
    supplier: signedAmount,
    contract: signedAmount,
    goodwill: signedAmount,
    /** Own cost of what the shop bears, goodwill included. */
    ourCost: signedAmount,
  }),
});

export const waitingVisit = z.object({
  visitId: id,
  visitNumber: z.int(),
  on: day,
  store: z.object({ id, name: z.string() }),
  client: z.object({ id, name: z.string() }),
  tech: z.string().nullable(),
  /** Machines and lines to decide, and what the lines are worth. */
  jobs: z.int(),
  lines: z.int(),
  list: signedAmount,
  cost: signedAmount,
});

const params = z.strictObject({ visitId: id });
const lines = z
  .array(z.strictObject({ lineKey: line(120), basis: line(64) }))
  .min(1)
  .max(500);

export const rulingOperations = defineOperations({
  'rulings.waiting': {
    method: 'GET',
    path: '/api/rulings/waiting',
    summary: 'Visits with lines to decide who bears them, oldest first',
    permission: 'rulings.read',
    query: listQuery({ sort: ['on'], filters: { clientId: id.optional() } }),
    answer: listOf(waitingVisit),
  },
  'rulings.show': {
    method: 'GET',
    path: '/api/visits/:visitId/rulings',
    summary: 'Who bears each line of a visit, and why',
    permission: 'rulings.read',
    params,
    answer: visitRulings,
    problems: ['conflict'],
  },
  'rulings.confirm': {
    method: 'POST',
    path: '/api/visits/:visitId/rulings/confirm',
    summary: 'Confirm what is proposed for some lines',
    permission: 'rulings.decide',
    params,
    body: z.strictObject({ lines }),
    answer: visitRulings,
    status: 200,
    problems: ['conflict'],
  },
  'rulings.overrule': {
    method: 'POST',
    path: '/api/visits/:visitId/rulings/overrule',
    summary: 'Decide that another bears some lines, and say why',
    permission: 'rulings.decide',
    params,
    body: z.strictObject({ lines, bearer, why: words(500).min(3) }),
    answer: visitRulings,
    status: 200,
    problems: ['conflict'],
  },
});
