import { type JobResult, type PriceBook, type Symptom } from '@lib/contracts';
import { addDays } from '@lib/domain';
import { type Context } from '../../core/context';
import { rows } from '../../core/database/tenancy';
import { type AnswerOf } from '../../core/http/route';
import { referenceColumn, workedOnColumn } from './job-reference';

export type EarlierJobItem = AnswerOf<'visits.sheet'>['earlierJobs'][number];

type Warranty = PriceBook['warranty'];

/** A completed job of the past, with the parts fitted then. */
export interface EarlierJobRow {
  jobId: string;
  machineId: string;
  bay: string;
  storeId: string;
  visitId: string;
  reference: string;
  on: string;
  signedOffOn: string | null;
  symptom: Symptom | '';
  category: string | null;
  finding: string;
  action: string;
  result: JobResult | null;
  parts: { partId: string | null; category: string; description: string; source: string }[];
}

/** The longest a job of the past can matter to a ruling: the last day of its longest warranty. */
export function longestWindow(rules: Warranty | undefined): number {
  if (!rules) return 90;
  const { labourDays, partDays, partDaysByCategory, callbackDays } = rules;
  return Math.max(labourDays, partDays, callbackDays, ...Object.values(partDaysByCategory));
}

const earlierSelect = `select j.id as "jobId", j.machine_id as "machineId", m.bay,
    j.store_id as "storeId", j.visit_id as "visitId",
    ${referenceColumn('j', 'v', 't')} as reference, ${workedOnColumn('v', 'h')}::text as on,
    t.signed_off_on as "signedOffOn", j.symptom, j.category, j.finding, j.action, j.result,
    coalesce((select jsonb_agg(jsonb_build_object('partId', u.part_id, 'category', u.category,
        'description', u.description, 'source', u.source) order by u.id)
      from part_uses u where u.shop_id = j.shop_id and u.job_id = j.id), '[]') as parts
  from jobs j
  join shops h on h.id = j.shop_id
  join machines m on m.shop_id = j.shop_id and m.id = j.machine_id
  join visits v on v.shop_id = j.shop_id and v.id = j.visit_id
  left join tickets t on t.shop_id = v.shop_id and t.id = v.ticket_id`;

/** Completed jobs on some machines since a day, but for those of one visit; newest first. */
export function earlierJobsOn(
  context: Pick<Context, 'shopId'>,
  of: { machineIds: readonly string[]; since: string; visitIds: readonly string[] },
): Promise<EarlierJobRow[]> {
  return rows<EarlierJobRow>(
    `${earlierSelect}
     where j.shop_id = $shopId and j.machine_id = any ($machineIds::uuid[])
       and v.id <> all ($visitIds::uuid[]) and v.state = 'completed' and j.result is not null
       and coalesce(t.signed_off_on, ${workedOnColumn('v', 'h')}) >= $since::date
     order by coalesce(t.signed_off_on, v.planned_on) desc, j.id desc limit 500`,
    { shopId: context.shopId, ...of },
  );
}

/** Jobs by their ids, whatever has become of their visit. */
export function earlierJobsById(
  context: Pick<Context, 'shopId'>,
  jobIds: readonly string[],
): Promise<EarlierJobRow[]> {
  if (jobIds.length === 0) return Promise.resolve([]);
  return rows<EarlierJobRow>(
    `${earlierSelect} where j.shop_id = $shopId and j.id = any ($jobIds::uuid[])`,
    { shopId: context.shopId, jobIds },
  );
}

/** The day a job's warranty counts from: sign-off, or the work itself while that is awaited. */
export function countsFrom(job: EarlierJobRow): string {
  return job.signedOffOn ?? job.on;
}

export function presentEarlierJob(job: EarlierJobRow, rules: Warranty | undefined): EarlierJobItem {
  return {
    jobId: job.jobId,
    machineId: job.machineId,
    bay: job.bay,
    visitId: job.visitId,
    reference: job.reference,
    on: job.on,
    symptom: job.symptom || null,
    category: job.category,
    finding: job.finding,
    action: job.action,
    parts: job.parts.map((part) => part.description),
    result: job.result,
    warrantedUntil: rules ? warrantedUntil(job, rules) : null,
  };
}

function warrantedUntil(job: EarlierJobRow, rules: Warranty): string | null {
  if (job.result !== 'put_right' && job.result !== 'replaced') return null;
  const ofParts = job.parts
    .filter((part) => part.source !== 'storeroom')
    .map((part) => rules.partDaysByCategory[part.category] ?? rules.partDays);
  const days = Math.max(rules.labourDays, ...ofParts);
  return days === 0 ? null : addDays(countsFrom(job), days);
}
