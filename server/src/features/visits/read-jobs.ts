import {
  type Cause,
  type Energy,
  type FindingCode,
  type JobResult,
  type MachineKind,
  type MachineState,
  type PartSource,
  type Symptom,
  type WarrantyMark,
} from '@lib/contracts';
import { type Context } from '../../core/context';
import { rows } from '../../core/database/tenancy';
import { instantOrNull } from '../../core/database/times';
import { type AnswerOf } from '../../core/http/route';
import { referenceColumn } from './job-reference';

export type ShownJob = AnswerOf<'visits.show'>['jobList'][number];

interface JobRow {
  id: string;
  visitId: string;
  position: number;
  machineId: string;
  bay: string;
  kind: MachineKind;
  energy: Energy;
  make: string;
  model: string;
  callId: string | null;
  symptom: Symptom | '';
  finding: string;
  findingCode: FindingCode | null;
  category: string | null;
  cause: Cause | null;
  action: string;
  result: JobResult | null;
  machineState: MachineState | null;
  testCycles: number;
  testCoins: number;
  testAmount: number;
  doneAt: Date | null;
  minutes: number;
  afterHoursMinutes: number;
  accessMinutes: number;
  cautions: string[];
  cautionsAt: Date | null;
  mark: WarrantyMark;
  markWords: string;
  markedBy: string;
  causedByJobId: string | null;
  causeReference: string | null;
  causeWords: string | null;
}

interface PartRow {
  jobId: string;
  id: string;
  partId: string | null;
  description: string;
  category: string;
  quantityMilli: number;
  source: PartSource;
}

interface PhotoRow {
  jobId: string;
  id: string;
  name: string;
  contentType: string;
  addedAt: Date;
}

/** The jobs of some visits with their parts and photos, in three queries however many there are. */
export async function jobsOfVisits(
  context: Context,
  visitIds: readonly string[],
): Promise<Map<string, ShownJob[]>> {
  const jobs = await rows<JobRow>(
    `select j.id, j.visit_id as "visitId", j.position, m.id as "machineId", m.bay, m.kind, m.energy,
       m.make, m.model, j.call_id as "callId", j.symptom, j.finding,
       j.finding_code as "findingCode", j.category, j.cause, j.action, j.result,
       j.machine_state as "machineState", j.test_cycles as "testCycles",
       j.test_coins as "testCoins", j.test_amount as "testAmount", j.done_at as "doneAt",
       j.minutes, j.after_hours_minutes as "afterHoursMinutes",
       j.access_minutes as "accessMinutes", j.cautions, j.cautions_at as "cautionsAt",
       j.warranty_mark as mark, j.mark_words as "markWords", j.marked_by as "markedBy",
       b.id as "causedByJobId", ${referenceColumn('b', 'bv', 'bt')} as "causeReference",
       b.action as "causeWords"
     from jobs j
     join machines m on m.shop_id = j.shop_id and m.id = j.machine_id
     left join jobs b on b.shop_id = j.shop_id and b.id = j.caused_by_job_id
     left join visits bv on bv.shop_id = b.shop_id and bv.id = b.visit_id
     left join tickets bt on bt.shop_id = bv.shop_id and bt.id = bv.ticket_id
     where j.shop_id = $shopId and j.visit_id = any ($visitIds::uuid[])
     order by j.position`,
    { shopId: context.shopId, visitIds },
  );
  const bind = { shopId: context.shopId, jobIds: jobs.map((job) => job.id) };
  const parts = await partsOf(bind);
  const photos = await photosOf(bind);
  const byVisit = new Map<string, ShownJob[]>(visitIds.map((id) => [id, []]));
  for (const job of jobs) {
    byVisit.get(job.visitId)?.push(
      presentJob(
        context,
        job,
        parts.filter((part) => part.jobId === job.id),
        photos.filter((photo) => photo.jobId === job.id),
      ),
    );
  }
  return byVisit;
}

export function partsOf(bind: { shopId: string; jobIds: string[] }): Promise<PartRow[]> {
  return rows<PartRow>(
    `select job_id as "jobId", id, part_id as "partId", description, category,
       quantity_milli as "quantityMilli", source
     from part_uses where shop_id = $shopId and job_id = any ($jobIds::uuid[]) order by id`,
    bind,
  );
}

function photosOf(bind: { shopId: string; jobIds: string[] }): Promise<PhotoRow[]> {
  return rows<PhotoRow>(
    `select owner_id as "jobId", id, name, content_type as "contentType", created_at as "addedAt"
     from attachments
     where shop_id = $shopId and owner_kind = 'job' and owner_id = any ($jobIds::uuid[])
     order by created_at, id`,
    bind,
  );
}

function presentJob(context: Context, job: JobRow, parts: PartRow[], photos: PhotoRow[]): ShownJob {
  return {
    id: job.id,
    position: job.position,
    machine: {
      id: job.machineId,
      bay: job.bay,
      kind: job.kind,
      energy: job.energy,
      make: job.make,
      model: job.model,
    },
    callId: job.callId,
    symptom: job.symptom || null,
    finding: job.finding,
    findingCode: job.findingCode,
    category: job.category,
    cause: job.cause,
    action: job.action,
    result: job.result,
    machineState: job.machineState,
    testCycles: job.testCycles,
    testCoins: job.testCoins,
    testAmount: context.role === 'attendant' ? null : job.testAmount,
    parts: parts.map(({ jobId: _, ...part }) => part),
    photos: photos.map(({ jobId: _, addedAt, ...photo }) => ({
      ...photo,
      addedAt: addedAt.toISOString(),
    })),
    doneAt: instantOrNull(job.doneAt),
    shop: context.clientId === null ? ofTheShop(job) : null,
  };
}

function ofTheShop(job: JobRow): ShownJob['shop'] {
  const { causedByJobId, causeReference } = job;
  return {
    minutes: job.minutes,
    afterHoursMinutes: job.afterHoursMinutes,
    accessMinutes: job.accessMinutes,
    cautions: job.cautions,
    cautionsAt: instantOrNull(job.cautionsAt),
    mark: job.mark,
    markWords: job.markWords,
    markedBy: job.markedBy,
    causedBy:
      causedByJobId !== null && causeReference !== null
        ? { jobId: causedByJobId, reference: causeReference, words: job.causeWords ?? '' }
        : null,
  };
}
