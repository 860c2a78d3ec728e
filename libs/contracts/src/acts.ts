import { z } from 'zod';
import {
  cause,
  findingCode,
  jobResult,
  machineState,
  partSource,
  symptom,
  visitState,
  warrantyMark,
} from './enums';
import { defineOperations } from './operation';
import { id, line, words } from './text';
import { amount, instant, minutes, quantityMilli, version } from './values';

const count = z.int().min(0).max(1000);
const ofJob = { jobId: id };

/** What each kind of act says. Kinds are stable: acts are kept for good. */
export const actPayloads = {
  arrived: z.strictObject({}),
  job_opened: z.strictObject({
    ...ofJob,
    machineId: id,
    callId: id.nullish(),
    symptom: symptom.nullish(),
  }),
  /** Cautions by their codes; several acts add up. */
  cautions_ticked: z.strictObject({ ...ofJob, cautions: z.array(line(40)).min(1).max(20) }),
  finding: z.strictObject({
    ...ofJob,
    code: findingCode.nullish(),
    category: line(40).toLowerCase().nullish(),
    words: words(1000),
  }),
  cause: z.strictObject({ ...ofJob, cause }),
  action: z.strictObject({ ...ofJob, words: words(1000) }),
  /** All of the job so far, not on top of what was said before. */
  minutes: z.strictObject({
    ...ofJob,
    minutes,
    afterHoursMinutes: minutes.default(0),
    accessMinutes: minutes.default(0),
  }),
  part_used: z
    .strictObject({
      ...ofJob,
      partUseId: id,
      partId: id.nullish(),
      /** Needed when the part is not in the price book; with what one cost. */
      description: line(160).nullish(),
      unitCost: amount.nullish(),
      quantityMilli: quantityMilli.default(1000),
      source: partSource,
    })
    .refine((p) => (p.partId ?? null) !== null || (p.description ?? null) !== null, {
      path: ['description'],
      error: 'is needed for a part that is not in the price book',
    }),
  part_removed: z.strictObject({ ...ofJob, partUseId: id }),
  /** All test cycles of the job so far, and the money they put into the machine. */
  test_cycle: z.strictObject({ ...ofJob, cycles: count, coins: count, amount }),
  photo: z.strictObject({ ...ofJob, attachmentId: id }),
  warranty_marked: z.strictObject({
    ...ofJob,
    mark: warrantyMark,
    words: words(500).default(''),
    causedByJobId: id.nullish(),
  }),
  /** The machine ran faultlessly: cause, result, minutes, test and state in one. */
  nothing_found: z.strictObject({
    ...ofJob,
    minutes,
    cycles: count,
    coins: count,
    amount: amount.default(0),
  }),
  job_done: z.strictObject({
    ...ofJob,
    result: jobResult,
    machineState: machineState.exclude(['retired']),
  }),
  /** Opened by mistake. */
  job_dropped: z.strictObject({ ...ofJob }),
  handed_over: z.strictObject({
    openItemId: id,
    machineId: id.nullish(),
    words: words(500).min(1),
  }),
  open_item_done: z.strictObject({ openItemId: id }),
  left: z.strictObject({}),
  /** The tech ends the visit: it is completed. */
  signed_off: z.strictObject({ receivedBy: line(120).nullish() }),
};
export type ActKind = keyof typeof actPayloads;

function actOf<K extends ActKind>(kind: K) {
  return z.strictObject({
    /** Made on the device: a repeat is known by it and changes nothing. */
    id,
    kind: z.literal(kind),
    /** When it happened, by the device's clock. */
    at: instant,
    payload: actPayloads[kind],
  });
}

export const act = z.discriminatedUnion('kind', [
  actOf('arrived'),
  actOf('job_opened'),
  actOf('cautions_ticked'),
  actOf('finding'),
  actOf('cause'),
  actOf('action'),
  actOf('minutes'),
  actOf('part_used'),
  actOf('part_removed'),
  actOf('test_cycle'),
  actOf('photo'),
  actOf('warranty_marked'),
  actOf('nothing_found'),
  actOf('job_done'),
  actOf('job_dropped'),
  actOf('handed_over'),
  actOf('open_item_done'),
  actOf('left'),
  actOf('signed_off'),
]);
export type Act = z.output<typeof act>;

export const actResult = z.object({
  id,
  /** `repeated`: it had been stored before. `refused`: it is not stored, and a person must look. */
  outcome: z.enum(['stored', 'repeated', 'refused']),
  /** Why it was refused, in plain words. */
  reason: z.string().nullable(),
});

const params = z.strictObject({ visitId: id });

export const actOperations = defineOperations({
  'acts.record': {
    method: 'POST',
    path: '/api/visits/:visitId/acts',
    summary: 'Record what happened on a visit; each act is answered for itself',
    permission: 'visits.record',
    // Each act carries its own id, so a repeat is harmless and needs no key.
    idempotency: 'natural',
    params,
    body: z.strictObject({ acts: z.array(act).min(1).max(200) }),
    answer: z.object({
      results: z.array(actResult),
      visit: z.object({ id, state: visitState, version }),
    }),
    status: 200,
  },
  'acts.list': {
    method: 'GET',
    path: '/api/visits/:visitId/acts',
    summary: 'The record of a visit: every act in the order it happened',
    permission: 'visits.record',
    params,
    answer: z.object({
      items: z.array(
        z.object({
          id,
          kind: z.string(),
          at: instant,
          receivedAt: instant,
          by: z.string(),
          payload: z.record(z.string(), z.unknown()),
        }),
      ),
    }),
  },
});
