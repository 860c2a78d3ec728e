import { z } from 'zod';
import { machineKind } from './enums';
import { listOf, listQuery } from './lists';
import { defineOperations } from './operation';
import { id, line } from './text';
import { amount, day, timeOfDay, version } from './values';

/** RFC 5545 recurrence rule, as in `FREQ=MONTHLY;BYDAY=1FR`; what it means is judged by the domain. */
const rule = line(200, 4);
const shift = z.enum(['next', 'previous', 'none']);

/** What a maintenance contract pays for, on machines of these kinds; no kinds means all. */
export const coverage = z.strictObject({
  labour: z.boolean(),
  parts: z.boolean(),
  trip: z.boolean(),
  kinds: z.array(machineKind).max(20),
});
export type Coverage = z.infer<typeof coverage>;

const contractStores = z
  .array(z.strictObject({ storeId: id, monthlyFee: amount }))
  .min(1)
  .max(200)
  .refine((all) => new Set(all.map((s) => s.storeId)).size === all.length, {
    error: 'names a store twice',
  });

const terms = z.strictObject({
  name: line(120),
  rule,
  startsOn: day,
  endsOn: day.nullable().default(null),
  /** When a round begins, on the shop's clock. */
  startTime: timeOfDay.default('09:00'),
  /** Where a round goes that falls on a day the shop is closed. */
  shift: shift.default('next'),
  coverage,
  techMembershipId: id.nullable().default(null),
  stores: contractStores,
});

const nextRound = z.object({
  /** The day the rule gives, and the day it is planned on when that one is closed. */
  dueOn: day,
  plannedOn: day,
});

export const contractItem = z.object({
  id,
  number: z.int(),
  name: z.string(),
  clientId: id,
  clientName: z.string(),
  /** The rule in plain words: `every month on the first Friday`. */
  ruleWords: z.string(),
  startsOn: day,
  endsOn: day.nullable(),
  state: z.enum(['coming', 'running', 'ended']),
  stores: z.int(),
  monthlyFee: amount,
  nextRoundOn: day.nullable(),
  version,
});

export const contractShown = contractItem.extend({
  rule: z.string(),
  startTime: z.string(),
  shift,
  coverage: z.object({
    labour: z.boolean(),
    parts: z.boolean(),
    trip: z.boolean(),
    kinds: z.array(machineKind),
  }),
  techMembershipId: id.nullable(),
  techName: z.string().nullable(),
  storeList: z.array(z.object({ storeId: id, storeName: z.string(), monthlyFee: amount })),
  nextRounds: z.array(nextRound),
});

export const round = z.object({
  id,
  contractId: id,
  contractName: z.string(),
  storeId: id,
  storeName: z.string(),
  dueOn: day,
  plannedOn: day,
  state: z.enum(['planned', 'done', 'skipped']),
  visitId: id.nullable(),
  visitNumber: z.int().nullable(),
  visitState: z.string().nullable(),
});

/** Days on which no round is planned: weekdays (1 is Monday, 7 Sunday), and single days. */
export const closures = z.object({
  weekdays: z.array(z.int().min(1).max(7)),
  days: z.array(z.object({ day, words: z.string() })),
  version,
});

const contractParams = z.strictObject({ contractId: id });

export const contractOperations = defineOperations({
  'contracts.list': {
    method: 'GET',
    path: '/api/contracts',
    summary: 'Maintenance contracts',
    permission: 'contracts.read',
    query: listQuery({
      sort: ['name', '-startsOn'],
      filters: {
        clientId: id.optional(),
        storeId: id.optional(),
        state: z.enum(['coming', 'running', 'ended']).optional(),
      },
    }),
    answer: listOf(contractItem),
  },
  'contracts.preview': {
    method: 'GET',
    path: '/api/contract-preview',
    summary: 'What a recurrence rule means: in words, and the next five rounds',
    permission: 'contracts.change',
    query: z.strictObject({
      rule: line(200, 1),
      startsOn: day,
      endsOn: day.optional(),
      shift: shift.default('next'),
    }),
    /** A rule that is not right is an answer, not a problem: it is shown while it is typed. */
    answer: z.object({
      valid: z.boolean(),
      problem: z.string().nullable(),
      words: z.string().nullable(),
      nextRounds: z.array(nextRound),
    }),
  },
  'contracts.show': {
    method: 'GET',
    path: '/api/contracts/:contractId',
    summary: 'A maintenance contract with its stores and next rounds',
    permission: 'contracts.read',
    params: contractParams,
    answer: contractShown,
  },
  'contracts.create': {
    method: 'POST',
    path: '/api/contracts',
    summary: 'Agree a maintenance contract with a client',
    permission: 'contracts.change',
    body: terms.extend({ clientId: id }),
    answer: contractShown,
  },
  'contracts.change': {
    method: 'PATCH',
    path: '/api/contracts/:contractId',
    summary: 'Change a maintenance contract; rounds already planned stay',
    permission: 'contracts.change',
    params: contractParams,
    ifMatch: true,
    body: terms,
    answer: contractShown,
    problems: ['conflict'],
  },
  'contracts.end': {
    method: 'POST',
    path: '/api/contracts/:contractId/end',
    summary: 'End a maintenance contract on a day',
    permission: 'contracts.change',
    params: contractParams,
    ifMatch: true,
    body: z.strictObject({ endsOn: day }),
    answer: contractShown,
    status: 200,
    problems: ['conflict'],
  },
  'closures.show': {
    method: 'GET',
    path: '/api/closures',
    summary: 'When the shop is closed, so that no round falls on it',
    permission: 'settings.read',
    answer: closures,
  },
  'closures.change': {
    method: 'PUT',
    path: '/api/closures',
    summary: 'Set when the shop is closed; rounds already planned stay',
    permission: 'settings.change',
    ifMatch: true,
    body: z.strictObject({
      weekdays: z
        .array(z.int().min(1).max(7))
        .max(6)
        .refine((all) => new Set(all).size === all.length, { error: 'names a day twice' }),
      days: z
        .array(z.strictObject({ day, words: line(80) }))
        .max(200)
        .refine((all) => new Set(all.map((d) => d.day)).size === all.length, {
          error: 'names a day twice',
        }),
    }),
    answer: closures,
  },
  'rounds.list': {
    method: 'GET',
    path: '/api/rounds',
    summary: 'Maintenance rounds, by day',
    permission: 'contracts.read',
    query: listQuery({
      sort: ['plannedOn', '-plannedOn'],
      filters: {
        contractId: id.optional(),
        storeId: id.optional(),
        state: z.enum(['planned', 'done', 'skipped']).optional(),
        from: day.optional(),
        to: day.optional(),
      },
    }),
    answer: listOf(round),
  },
});
