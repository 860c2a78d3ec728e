import { z } from 'zod';
import { attachment } from './files';
import { callState, machineKind, machineState, symptom, visitState } from './enums';
import { listOf, listQuery } from './lists';
import { defineOperations } from './operation';
import { id, line, words } from './text';
import { day, instant, version } from './values';

/** When somebody comes; the instants of the arrival window, when one was promised. */
export const arrivalWindow = z.object({ from: instant, until: instant });

export const call = z.object({
  id,
  number: z.int(),
  store: z.object({ id, name: z.string() }),
  client: z.object({ id, name: z.string() }),
  machine: z
    .object({ id, bay: z.string(), kind: machineKind, make: z.string(), model: z.string() })
    .nullable(),
  symptom,
  words: z.string(),
  state: callState,
  reportedBy: z.string(),
  reportedVia: z.enum(['office', 'tech', 'client', 'sticker']),
  reportedAt: instant,
  closedAt: instant.nullable(),
  /** The visit it is planned on, or was closed by. */
  visit: z
    .object({
      id,
      number: z.int(),
      state: visitState,
      plannedOn: day,
      window: arrivalWindow.nullable(),
    })
    .nullable(),
  version,
});

/** How far a call has come, for whoever reported it; without money. */
export const callStep = z.object({
  step: z.enum(['reported', 'planned', 'confirmed', 'arrived', 'done', 'withdrawn']),
  /** Null: not so far yet. */
  at: instant.nullable(),
  words: z.string(),
});

export const callShown = call.extend({
  machineState: machineState.nullable(),
  progress: z.array(callStep),
  photos: z.array(attachment),
});

const params = z.strictObject({ callId: id });
const callWords = words(1000);

export const callOperations = defineOperations({
  'calls.list': {
    method: 'GET',
    path: '/api/calls',
    summary: 'Calls, newest first',
    permission: 'calls.read',
    query: listQuery({
      sort: ['-reportedAt'],
      filters: {
        /** `live`: open or planned. */
        state: z.enum([...callState.options, 'live']).optional(),
        storeId: id.optional(),
        clientId: id.optional(),
        machineId: id.optional(),
      },
    }),
    answer: listOf(call),
  },
  'calls.show': {
    method: 'GET',
    path: '/api/calls/:callId',
    summary: 'One call, how far it has come, and its photos',
    permission: 'calls.read',
    params,
    answer: callShown,
  },
  'calls.report': {
    method: 'POST',
    path: '/api/calls',
    summary: 'Report a fault; photos are added to the call afterwards',
    permission: 'calls.report',
    body: z
      .strictObject({
        storeId: id,
        /** Absent: not known, or of no machine. */
        machineId: id.nullish(),
        symptom,
        words: callWords.default(''),
        /** Who rang, when somebody of the shop writes it down; else the caller's own name stands. */
        reportedBy: line(120).optional(),
      })
      .refine((body) => body.symptom !== 'other' || body.words !== '', {
        path: ['words'],
        error: 'are needed to say what it is',
      }),
    answer: callShown,
    problems: ['not-found', 'conflict'],
  },
  'calls.change': {
    method: 'PATCH',
    path: '/api/calls/:callId',
    summary: 'Put right what was written down of a call',
    permission: 'calls.change',
    params,
    ifMatch: true,
    body: z.strictObject({ machineId: id.nullable(), symptom, words: callWords }).partial(),
    answer: callShown,
    problems: ['conflict'],
  },
  'calls.withdraw': {
    method: 'POST',
    path: '/api/calls/:callId/withdraw',
    summary: 'Take a call back; people of the client only before a visit is planned for it',
    permission: 'calls.report',
    params,
    ifMatch: true,
    body: z.strictObject({ words: words(500).default('') }),
    answer: callShown,
    status: 200,
    problems: ['conflict'],
  },
});
