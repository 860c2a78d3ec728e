import { type Act, type ActKind, type JobResult, type MachineState } from '@lib/contracts';
import { cautionsFor } from '@lib/domain';
import {
  type DatedAct,
  type JobRecord,
  type MachineFact,
  type VisitFacts,
  type VisitRecord,
} from './visit-record';

type PayloadOf<K extends ActKind> = Extract<Act, { kind: K }>['payload'];

interface Situation<K extends ActKind> {
  record: VisitRecord;
  payload: PayloadOf<K>;
  dated: DatedAct;
  facts: VisitFacts;
  /** An act that was stored before: what it had to satisfy, it has satisfied. */
  stored: boolean;
}

/** Changes the record, or answers with why it cannot and leaves the record as it was. */
type Apply<K extends ActKind> = (situation: Situation<K>) => string | undefined;

/**
 * What one act does to the record of a visit. Pure: the same acts in the same order come to the
 * same record, whenever and however often they are delivered.
 *
 * @returns why the act cannot be applied, in words for the tech; undefined when it was
 */
export function projectAct(
  record: VisitRecord,
  dated: DatedAct,
  facts: VisitFacts,
  stored: boolean,
): string | undefined {
  const apply = appliers[dated.act.kind] as Apply<ActKind>;
  return apply({ record, payload: dated.act.payload, dated, facts, stored });
}

const appliers: { [K in ActKind]: Apply<K> } = {
  arrived: ({ record, dated }) => {
    record.started = true;
    record.arrivedAt ??= dated.at;
    const { membershipId } = dated.by;
    const here = record.times.some((t) => t.membershipId === membershipId && t.leftAt === null);
    if (!here) record.times.push({ membershipId, arrivedAt: dated.at, leftAt: null });
    return undefined;
  },

  left: ({ record, dated }) => {
    const { membershipId } = dated.by;
    const here = record.times.findLast((t) => t.membershipId === membershipId);
    if (!here) return 'You have not arrived on this visit.';
    here.leftAt = dated.at;
    record.leftAt = dated.at;
    return undefined;
  },

  job_opened: ({ record, payload, dated, facts, stored }) => {
    const machine = facts.machines.get(payload.machineId);
    if (!machine && !stored) return 'The machine is not of this store.';
    if (machine?.retired && !stored) return `${machine.bay} was taken out for good.`;
    if (record.jobs.has(payload.jobId)) return 'The job is open already.';
    if (record.dropped.has(payload.jobId)) return 'The job was dropped.';
    if ([...record.jobs.values()].some((job) => job.machineId === payload.machineId)) {
      return `${machine?.bay ?? 'The machine'} has a job on this visit already.`;
    }
    record.started = true;
    record.jobs.set(payload.jobId, newJob(payload, dated));
    return undefined;
  },

  job_dropped: (situation) =>
    onJob(situation, (job, { record, facts, stored }) => {
      const kept = record.completedAt !== null || facts.keptJobIds.has(job.id);
      if (kept && !stored) return 'The visit is completed: the job stands.';
      if ([...record.jobs.values()].some((other) => other.causedByJobId === job.id)) {
        return 'Another job names it as its cause.';
      }
      record.jobs.delete(job.id);
      record.dropped.add(job.id);
      for (const part of record.parts.values()) {
        if (part.jobId === job.id) record.parts.delete(part.id);
      }
      return undefined;
    }),

  cautions_ticked: (situation) =>
    onJob(situation, (job, { payload, dated, facts }) => {
      for (const code of payload.cautions) job.cautions.add(code);
      if (missingCautions(job, facts).length === 0) job.cautionsAt ??= dated.at;
      return undefined;
    }),

  finding: (situation) =>
    onJob(situation, (job, { payload }) => {
      const refusal = refuseUncautioned(job, situation);
      if (refusal) return refusal;
      job.finding = payload.words;
      job.findingCode = payload.code ?? null;
      job.category = payload.category ?? null;
      return undefined;
    }),

  cause: (situation) =>
    onJob(situation, (job, { payload }) => {
      job.cause = payload.cause;
      return undefined;
    }),

  action: (situation) =>
    onJob(situation, (job, { payload }) => {
      const refusal = refuseUncautioned(job, situation);
      if (refusal) return refusal;
      job.action = payload.words;
      return undefined;
    }),

  minutes: (situation) =>
    onJob(situation, (job, { record, payload, dated }) => {
      job.minutes = payload.minutes;
      job.afterHoursMinutes = payload.afterHoursMinutes;
      job.accessMinutes = payload.accessMinutes;
      workedBy(record, job, dated);
      return undefined;
    }),

  part_used: (situation) =>
    onJob(situation, (job, { record, payload, facts, stored }) => {
      const refusal = refuseUncautioned(job, situation);
      if (refusal) return refusal;
      if (record.parts.has(payload.partUseId)) return 'The part is written down already.';
      if (payload.partId && !facts.partIds.has(payload.partId) && !stored) {
        return 'The part is not in the price book.';
      }
      record.parts.set(payload.partUseId, {
        id: payload.partUseId,
        jobId: job.id,
        partId: payload.partId ?? null,
        description: payload.description ?? null,
        unitCost: payload.unitCost ?? null,
        quantityMilli: payload.quantityMilli,
        source: payload.source,
      });
      return undefined;
    }),

  part_removed: (situation) =>
    onJob(situation, (job, { record, payload }) => {
      if (record.parts.get(payload.partUseId)?.jobId !== job.id) {
        return 'The part is not written down on this job.';
      }
      record.parts.delete(payload.partUseId);
      return undefined;
    }),

  test_cycle: (situation) =>
    onJob(situation, (job, { payload }) => {
      job.testCycles = payload.cycles;
      job.testCoins = payload.coins;
      job.testAmount = payload.amount;
      return undefined;
    }),

  photo: (situation) =>
    onJob(situation, (job, { payload, facts }) => {
      const owner = facts.photoOwners.get(payload.attachmentId);
      const another = owner !== undefined && owner !== job.id;
      return another ? 'The photo belongs to something else.' : undefined;
    }),

  warranty_marked: (situation) =>
    onJob(situation, (job, { record, payload, dated, facts, stored }) => {
      const causedBy = payload.causedByJobId ?? null;
      if (causedBy === job.id) return 'A job cannot have brought itself about.';
      const known = causedBy === null || facts.causeIds.has(causedBy) || record.jobs.has(causedBy);
      if (!known && !stored) return 'There is no such earlier job.';
      job.mark = payload.mark;
      job.markWords = payload.words;
      job.markedBy = dated.by.name;
      job.causedByJobId = causedBy;
      return undefined;
    }),

  nothing_found: (situation) =>
    onJob(situation, (job, { payload, dated, record }) => {
      job.cause = 'nothing_found';
      job.minutes = payload.minutes;
      job.testCycles = payload.cycles;
      job.testCoins = payload.coins;
      job.testAmount = payload.amount;
      workedBy(record, job, dated);
      leave(record, job, dated, { result: 'nothing_found', state: 'up' });
      return undefined;
    }),

  job_done: (situation) =>
    onJob(situation, (job, { payload, dated, record, facts, stored }) => {
      const refusal = stored ? undefined : contradiction(payload, job, facts);
      if (refusal) return refusal;
      if (payload.result === 'nothing_found') job.cause ??= 'nothing_found';
      leave(record, job, dated, { result: payload.result, state: payload.machineState });
      return undefined;
    }),

  handed_over: ({ record, payload, dated, facts, stored }) => {
    if (record.openItems.has(payload.openItemId)) return 'It is handed over already.';
    const { machineId } = payload;
    if (machineId && !facts.machines.has(machineId) && !stored) {
      return 'The machine is not of this store.';
    }
    record.openItems.set(payload.openItemId, {
      id: payload.openItemId,
      machineId: machineId ?? null,
      words: payload.words,
      at: dated.at,
    });
    return undefined;
  },

  open_item_done: ({ record, payload, dated, facts, stored }) => {
    const known = record.openItems.has(payload.openItemId);
    if (!known && !facts.openItemIds.has(payload.openItemId) && !stored) {
      return 'There is no such open item at this store.';
    }
    if (!record.itemsDone.has(payload.openItemId)) {
      record.itemsDone.set(payload.openItemId, dated.at);
    }
    return undefined;
  },

  signed_off: ({ record, payload, dated, facts, stored }) => {
    const without = [...record.jobs.values()].filter((job) => job.result === null);
    if (without.length > 0 && !stored) {
      const bays = without.map((job) => bayOf(job, facts)).join(', ');
      return `${bays} ${without.length === 1 ? 'has' : 'have'} no result yet.`;
    }
    record.started = true;
    record.completedAt ??= dated.at;
    record.receivedBy = payload.receivedBy ?? record.receivedBy;
    return undefined;
  },
};

function onJob<K extends ActKind>(
  situation: Situation<K> & { payload: { jobId: string } },
  work: (job: JobRecord, situation: Situation<K>) => string | undefined,
): string | undefined {
  const { record, payload } = situation;
  const job = record.jobs.get(payload.jobId);
  if (job) return work(job, situation);
  return record.dropped.has(payload.jobId) ? 'The job was dropped.' : 'There is no such job.';
}

function newJob(payload: PayloadOf<'job_opened'>, dated: DatedAct): JobRecord {
  return {
    id: payload.jobId,
    machineId: payload.machineId,
    callId: payload.callId ?? null,
    symptom: payload.symptom ?? null,
    cautions: new Set(),
    cautionsAt: null,
    finding: '',
    findingCode: null,
    category: null,
    cause: null,
    action: '',
    result: null,
    machineState: null,
    minutes: 0,
    afterHoursMinutes: 0,
    accessMinutes: 0,
    testCycles: 0,
    testCoins: 0,
    testAmount: 0,
    mark: 'none',
    markWords: '',
    markedBy: '',
    causedByJobId: null,
    membershipId: dated.by.membershipId,
    openedAt: dated.at,
    doneAt: null,
  };
}

/** The minutes are those of whoever was there; the office that puts them right only wrote them down. */
function workedBy(record: VisitRecord, job: JobRecord, { by }: DatedAct): void {
  const there = record.times.some((time) => time.membershipId === by.membershipId);
  if (there) job.membershipId = by.membershipId;
}

function leave(
  record: VisitRecord,
  job: JobRecord,
  dated: DatedAct,
  left: { result: JobResult; state: MachineState },
): void {
  job.result = left.result;
  job.machineState = left.state;
  job.doneAt = dated.at;
  record.machineStates.set(job.machineId, {
    state: left.state,
    at: dated.at,
    actId: dated.act.id,
  });
}

/** Covers stay on until every caution for the machine is ticked. Testing needs none of them. */
function refuseUncautioned<K extends ActKind>(
  job: JobRecord,
  { facts, stored }: Situation<K>,
): string | undefined {
  if (stored) return undefined;
  const missing = missingCautions(job, facts).length;
  if (missing === 0) return undefined;
  return `Tick the cautions for ${bayOf(job, facts)} first: ${missing} left.`;
}

function missingCautions(job: JobRecord, facts: VisitFacts): string[] {
  const machine: MachineFact | undefined = facts.machines.get(job.machineId);
  if (!machine) return [];
  return cautionsFor(machine.kind, machine.energy)
    .map((caution) => caution.code as string)
    .filter((code) => !job.cautions.has(code));
}

/** A result, a cause and a state that cannot all be true. */
function contradiction(
  { result, machineState }: PayloadOf<'job_done'>,
  job: JobRecord,
  facts: VisitFacts,
): string | undefined {
  const bay = bayOf(job, facts);
  const works = machineState === 'up' || machineState === 'degraded';
  if (result !== 'made_safe' && result !== 'unfinished' && !works) {
    return `${bay} cannot be ${words(result)} and ${words(machineState)}.`;
  }
  if (result === 'made_safe' && works) return `${bay} cannot be made safe and ${machineState}.`;
  if ((result === 'put_right' || result === 'replaced') && job.cause === null) {
    return `Say first what the cause was on ${bay}.`;
  }
  return undefined;
}

function bayOf(job: JobRecord, facts: VisitFacts): string {
  return facts.machines.get(job.machineId)?.bay ?? 'A machine';
}

function words(value: string): string {
  return value.replaceAll('_', ' ');
}
