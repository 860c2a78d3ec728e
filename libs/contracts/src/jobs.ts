import { z } from 'zod';
import {
  cause,
  energy,
  findingCode,
  jobResult,
  machineKind,
  machineState,
  partSource,
  symptom,
  warrantyMark,
} from './enums';
import { listOf, listQuery } from './lists';
import { defineOperations } from './operation';
import { id } from './text';
import { day, instant } from './values';

/** A part fitted on a job. What it costs stands on the ticket. */
export const partUse = z.object({
  id,
  partId: id.nullable(),
  description: z.string(),
  category: z.string(),
  quantityMilli: z.int(),
  source: partSource,
});

/** A job of the past that may have brought a failure about. */
export const earlierJob = z.object({
  jobId: id,
  machineId: id,
  bay: z.string(),
  visitId: id,
  /** As people quote it: ticket and place on it, `0398/2`; or `visit 412/2` before sign-off. */
  reference: z.string(),
  on: day,
  symptom: symptom.nullable(),
  category: z.string().nullable(),
  finding: z.string(),
  action: z.string(),
  parts: z.array(z.string()),
  result: jobResult.nullable(),
  /** Last day of the shop's warranty on the labour, and on any part it fitted; null for none. */
  warrantedUntil: day.nullable(),
});

/** The work on one machine of a visit. */
export const job = z.object({
  id,
  /** Its place in the visit: the 2 of ticket 0398/2. */
  position: z.int(),
  machine: z.object({
    id,
    bay: z.string(),
    kind: machineKind,
    energy,
    make: z.string(),
    model: z.string(),
  }),
  callId: id.nullable(),
  symptom: symptom.nullable(),
  finding: z.string(),
  findingCode: findingCode.nullable(),
  /** What failed, by the shop's part categories. */
  category: z.string().nullable(),
  cause: cause.nullable(),
  action: z.string(),
  result: jobResult.nullable(),
  /** How the machine was left. */
  machineState: machineState.nullable(),
  testCycles: z.int(),
  testCoins: z.int(),
  /** Money that test cycles put into the machine; null for attendants. */
  testAmount: z.int().nullable(),
  parts: z.array(partUse),
  photos: z.array(z.object({ id, name: z.string(), contentType: z.string(), addedAt: instant })),
  doneAt: instant.nullable(),
  /** The shop's own; null for people of the client. */
  shop: z
    .object({
      minutes: z.int(),
      afterHoursMinutes: z.int(),
      accessMinutes: z.int(),
      cautions: z.array(z.string()),
      /** When the last caution was ticked; null while some are missing. */
      cautionsAt: instant.nullable(),
      mark: warrantyMark,
      markWords: z.string(),
      markedBy: z.string(),
      causedBy: z.object({ jobId: id, reference: z.string(), words: z.string() }).nullable(),
    })
    .nullable(),
});

/** One line of what was ever done to a machine. */
export const machineHistoryItem = z.object({
  jobId: id,
  visitId: id,
  visitNumber: z.int(),
  position: z.int(),
  on: day,
  symptom: symptom.nullable(),
  finding: z.string(),
  category: z.string().nullable(),
  cause: cause.nullable(),
  action: z.string(),
  result: jobResult.nullable(),
  machineState: machineState.nullable(),
  parts: z.array(partUse),
  photos: z.int(),
  /** Null until the visit is signed off, and for attendants. */
  ticket: z.object({ id, number: z.int() }).nullable(),
});

export const jobOperations = defineOperations({
  'machines.history': {
    method: 'GET',
    path: '/api/machines/:machineId/history',
    summary: 'Every job on a machine, newest first',
    permission: 'machines.read',
    params: z.strictObject({ machineId: id }),
    query: listQuery({ sort: ['-on'] }),
    answer: listOf(machineHistoryItem),
  },
  'jobs.causeCandidates': {
    method: 'GET',
    path: '/api/jobs/:jobId/cause-candidates',
    summary: 'Earlier jobs that may have brought this one about, the likeliest first',
    permission: 'visits.record',
    params: z.strictObject({ jobId: id }),
    answer: z.object({ items: z.array(earlierJob.extend({ why: z.array(z.string()) })) }),
  },
});
