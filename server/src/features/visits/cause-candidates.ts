import { type Symptom } from '@lib/contracts';
import { addDays, daysBetween } from '@lib/domain';
import { type Context } from '../../core/context';
import { row, rows, withTenant } from '../../core/database/tenancy';
import { type AnswerOf } from '../../core/http/route';
import { found } from '../../core/problems/problem';
import { editionInForce } from '../prices/edition-in-force';
import {
  countsFrom,
  type EarlierJobRow,
  earlierJobsOn,
  longestWindow,
  presentEarlierJob,
} from './earlier-jobs';
import { workedOnColumn } from './job-reference';
import { visitRow } from './read-visits';

interface JobFacts {
  visitId: string;
  storeId: string;
  machineId: string;
  category: string | null;
  symptom: Symptom | '';
  on: string;
}

/** Earlier jobs at the store that may have brought a job about, the likeliest first. */
export function causeCandidates(
  context: Context,
  jobId: string,
): Promise<AnswerOf<'jobs.causeCandidates'>> {
  return withTenant(context, async () => {
    const job = found(
      await row<JobFacts>(
        `select j.visit_id as "visitId", j.store_id as "storeId", j.machine_id as "machineId",
           j.category, j.symptom, ${workedOnColumn('v', 'h')}::text as on
         from jobs j join shops h on h.id = j.shop_id
         join visits v on v.shop_id = j.shop_id and v.id = j.visit_id
         where j.shop_id = $shopId and j.id = $jobId`,
        { shopId: context.shopId, jobId },
      ),
    );
    await visitRow(context, job.visitId);
    const rules = (await editionInForce(context, job.on))?.book.warranty;
    const machines = await rows<{ id: string }>(
      `select id from machines where shop_id = $shopId and store_id = $storeId`,
      { shopId: context.shopId, storeId: job.storeId },
    );
    const earlier = await earlierJobsOn(context, {
      machineIds: machines.map((machine) => machine.id),
      since: addDays(job.on, -longestWindow(rules)),
      visitIds: [job.visitId],
    });
    return {
      items: earlier
        .filter(({ result }) => result !== 'nothing_found')
        .map((candidate) => ({ candidate, ...likeness(job, candidate) }))
        .sort((a, b) => b.weight - a.weight || a.daysAgo - b.daysAgo)
        .slice(0, 20)
        .map(({ candidate, why }) => ({ ...presentEarlierJob(candidate, rules), why })),
    };
  });
}

/** What speaks for an earlier job: the same machine most, then the same part, then the fault. */
function likeness(job: JobFacts, candidate: EarlierJobRow) {
  const daysAgo = Math.max(0, daysBetween(countsFrom(candidate), job.on));
  const signs: [boolean, number, string][] = [
    [candidate.machineId === job.machineId, 8, 'On the same machine'],
    [same(candidate.category, job.category), 4, `Also worked on: ${candidate.category}`],
    [same(candidate.symptom, job.symptom), 2, 'The same fault was reported'],
    [candidate.result === 'unfinished' || candidate.result === 'made_safe', 1, 'Left unfinished'],
  ];
  const holding = signs.filter(([holds]) => holds);
  return {
    weight: holding.reduce((sum, [, weight]) => sum + weight, 0),
    why: [...holding.map(([, , words]) => words), daysWords(daysAgo)],
    daysAgo,
  };
}

function same(a: string | null, b: string | null): boolean {
  return a !== null && a !== '' && a === b;
}

function daysWords(days: number): string {
  return days === 0 ? 'The same day' : `${days} ${days === 1 ? 'day' : 'days'} earlier`;
}
