import { z } from 'zod';
import { arrivalWindow, call } from './calls';
import { condition } from './conditions';
import { energy, machineKind, machineState, visitState } from './enums';
import { earlierJob, job } from './jobs';
import { listOf, listQuery } from './lists';
import { defineOperations } from './operation';
import { id, words } from './text';
import { day, instant, timeOfDay, version } from './values';

export const visitTech = z.object({ membershipId: id, name: z.string(), initials: z.string() });

export const visitItem = z.object({
  id,
  number: z.int(),
  store: z.object({ id, name: z.string(), address: z.string() }),
  client: z.object({ id, name: z.string() }),
  tech: visitTech.nullable(),
  plannedOn: day,
  window: arrivalWindow.nullable(),
  state: visitState,
  reason: z.string(),
  calls: z.int(),
  /** Bays of the machines it is for: those of its calls and its jobs. */
  bays: z.array(z.string()),
  jobs: z.int(),
  arrivedAt: instant.nullable(),
  leftAt: instant.nullable(),
  /** Null while it is not signed off, and for attendants. */
  ticket: z.object({ id, number: z.int() }).nullable(),
  /** The maintenance round it is; null for a repair. */
  roundId: id.nullable(),
  version,
});

const openItem = z.object({
  id,
  machine: z.object({ id, bay: z.string() }).nullable(),
  words: z.string(),
  visitId: id,
  createdAt: instant,
  doneAt: instant.nullable(),
});

const visitCall = call.pick({
  id: true,
  number: true,
  machine: true,
  symptom: true,
  words: true,
  state: true,
  reportedBy: true,
  reportedAt: true,
  version: true,
});

export const visitShown = visitItem.extend({
  /** One sentence for the owner of the store: `Put right. A-01 had nothing wrong.` */
  words: z.string(),
  receivedBy: z.string().nullable(),
  callList: z.array(visitCall),
  jobList: z.array(job),
  /** What this visit left for the next one. */
  handedOver: z.array(openItem),
  /** Who was there; empty for people of the client. */
  times: z.array(z.object({ name: z.string(), arrivedAt: instant, leftAt: instant.nullable() })),
  /** Lines to decide who bears them; null for people of the client and techs. */
  rulings: z.object({ lines: z.int(), waiting: z.int() }).nullable(),
});

/** A visit with all a tech needs on the spot, also without a signal. */
export const visitSheet = z.object({
  visit: visitItem,
  store: z.object({
    id,
    name: z.string(),
    address: z.string(),
    hours: z.string(),
    accessWords: z.string(),
    /** What a test card is loaded with; minor units. */
    cardValue: z.int(),
  }),
  contacts: z.array(z.object({ name: z.string(), phone: z.string() })),
  conditions: z.array(condition),
  openItems: z.array(openItem),
  machines: z.array(
    z.object({
      id,
      bay: z.string(),
      bayNumber: z.int(),
      bank: z.object({ id, letter: z.string(), words: z.string() }),
      kind: machineKind,
      energy,
      make: z.string(),
      model: z.string(),
      serial: z.string(),
      state: machineState,
      vendPrice: z.int(),
      supplierWarrantyUntil: day.nullable(),
    }),
  ),
  calls: z.array(visitCall),
  jobs: z.array(job),
  /** Jobs on machines of this store within the shop's longest warranty, newest first. */
  earlierJobs: z.array(earlierJob),
});

const window = z
  .strictObject({ from: timeOfDay, until: timeOfDay })
  .refine((w) => w.from < w.until, { path: ['until'], error: 'is not after its beginning' });

const params = z.strictObject({ visitId: id });
const callIds = z.array(id).max(50);

export const visitOperations = defineOperations({
  'visits.list': {
    method: 'GET',
    path: '/api/visits',
    summary: 'Visits by day',
    permission: 'visits.read',
    query: listQuery({
      sort: ['-plannedOn', 'plannedOn'],
      filters: {
        from: day.optional(),
        until: day.optional(),
        techMembershipId: id.optional(),
        storeId: id.optional(),
        clientId: id.optional(),
        machineId: id.optional(),
        /** `live`: planned, confirmed or in process. `unticketed`: completed, not signed off. */
        state: z.enum([...visitState.options, 'live', 'unticketed']).optional(),
      },
    }),
    answer: listOf(visitItem),
  },
  'visits.show': {
    method: 'GET',
    path: '/api/visits/:visitId',
    summary: 'One visit: calls, jobs, photos, what was left to do',
    permission: 'visits.read',
    params,
    answer: visitShown,
  },
  'visits.plan': {
    method: 'POST',
    path: '/api/visits',
    summary: 'Plan a visit to a store, for calls or for another reason',
    permission: 'visits.plan',
    body: z
      .strictObject({
        storeId: id,
        plannedOn: day,
        /** On the clock of the store. */
        window: window.nullish(),
        techMembershipId: id.nullish(),
        callIds: callIds.default([]),
        reason: words(500).default(''),
      })
      .refine((body) => body.callIds.length > 0 || body.reason !== '', {
        path: ['reason'],
        error: 'is needed for a visit without a call',
      }),
    answer: visitShown,
    problems: ['conflict', 'not-found'],
  },
  'visits.change': {
    method: 'PATCH',
    path: '/api/visits/:visitId',
    summary: 'Move a visit, assign it to a tech, or change what it is for',
    permission: 'visits.plan',
    params,
    ifMatch: true,
    body: z
      .strictObject({
        plannedOn: day,
        window: window.nullable(),
        techMembershipId: id.nullable(),
        /** All its calls: those left out become open again. */
        callIds,
        reason: words(500),
      })
      .partial(),
    answer: visitShown,
    problems: ['conflict'],
  },
  'visits.confirm': {
    method: 'POST',
    path: '/api/visits/:visitId/confirm',
    summary: 'Note that the store knows of the visit and agrees',
    permission: 'visits.plan',
    params,
    ifMatch: true,
    answer: visitShown,
    status: 200,
    problems: ['conflict'],
  },
  'visits.cancel': {
    method: 'POST',
    path: '/api/visits/:visitId/cancel',
    summary: 'Cancel a visit on which nothing was done; its calls become open again',
    permission: 'visits.plan',
    params,
    ifMatch: true,
    body: z.strictObject({ words: words(500).default('') }),
    answer: visitShown,
    status: 200,
    problems: ['conflict'],
  },
  'visits.daySheet': {
    method: 'GET',
    path: '/api/day-sheet',
    summary: 'The visits of a day by tech, and those without one',
    permission: 'visits.plan',
    query: z.strictObject({ on: day.optional() }),
    answer: z.object({
      on: day,
      techs: z.array(visitTech.extend({ visits: z.array(visitItem) })),
      unplaced: z.array(visitItem),
      /** Calls no visit is planned for. */
      openCalls: z.int(),
    }),
  },
  'visits.day': {
    method: 'GET',
    path: '/api/my-day',
    summary: 'Your own visits of a day and those without a tech, with all they need',
    permission: 'visits.record',
    query: z.strictObject({ on: day.optional() }),
    answer: z.object({ on: day, sheets: z.array(visitSheet) }),
  },
  'visits.sheet': {
    method: 'GET',
    path: '/api/visits/:visitId/sheet',
    summary: 'One visit with all a tech needs on the spot',
    permission: 'visits.record',
    params,
    answer: visitSheet,
  },
});
