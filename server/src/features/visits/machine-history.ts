import { type Cause, type JobResult, type MachineState, type Symptom } from '@lib/contracts';
import { type Context } from '../../core/context';
import { type Bind, row, withTenant } from '../../core/database/tenancy';
import { type AnswerOf, type InputOf } from '../../core/http/route';
import { page, searched } from '../../core/lists/keyset';
import { found } from '../../core/problems/problem';
import { ownStore } from '../stores/own-store';
import { workedOnColumn } from './job-reference';
import { partsOf } from './read-jobs';

type Item = AnswerOf<'machines.history'>['items'][number];

interface HistoryRow {
  jobId: string;
  visitId: string;
  visitNumber: number;
  position: number;
  on: string;
  symptom: Symptom | '';
  finding: string;
  category: string | null;
  cause: Cause | null;
  action: string;
  result: JobResult | null;
  machineState: MachineState | null;
  photos: number;
  ticketId: string | null;
  ticketNumber: number | null;
}

const historyFrom = 'jobs j join visits v on v.shop_id = j.shop_id and v.id = j.visit_id';

/** Every job on a machine, newest first. */
export function machineHistory(
  context: Context,
  machineId: string,
  query: InputOf<'machines.history'>['query'],
): Promise<AnswerOf<'machines.history'>> {
  return withTenant(context, async () => {
    const bind: Bind = { shopId: context.shopId, machineId };
    const own = ownStore(context, 'm.store_id', bind);
    found(
      await row(
        `select 1 from machines m where ${['m.shop_id = $shopId', 'm.id = $machineId', ...own].join(' and ')}`,
        bind,
      ),
    );
    const seesTickets = context.role !== 'attendant';
    const ofMachine: Bind = { shopId: context.shopId, machineId };
    const list = await page<HistoryRow, Omit<Item, 'parts'>>(
      {
        select: `select j.id as "jobId", v.id as "visitId", v.number as "visitNumber", j.position,
            ${workedOnColumn('v', 'h')}::text as on, j.symptom, j.finding, j.category, j.cause,
            j.action, j.result, j.machine_state as "machineState",
            (select count(*)::int from attachments a where a.shop_id = j.shop_id
              and a.owner_kind = 'job' and a.owner_id = j.id) as photos,
            t.id as "ticketId", t.number as "ticketNumber"
          from ${historyFrom} join shops h on h.id = j.shop_id
          left join tickets t on t.shop_id = v.shop_id and t.id = v.ticket_id`,
        from: historyFrom,
        where: [
          'j.shop_id = $shopId',
          'j.machine_id = $machineId',
          ...searched(query.q, ['j.finding', 'j.action'], ofMachine),
        ],
        bind: ofMachine,
        sort: { column: 'j.created_at', type: 'timestamptz', descending: true },
        id: 'j.id',
        limit: query.limit,
        cursor: query.cursor,
      },
      ({ ticketId, ticketNumber, symptom, ...job }) => ({
        ...job,
        symptom: symptom || null,
        ticket:
          seesTickets && ticketId !== null && ticketNumber !== null
            ? { id: ticketId, number: ticketNumber }
            : null,
      }),
    );
    const parts = await partsOf({
      shopId: context.shopId,
      jobIds: list.items.map((job) => job.jobId),
    });
    return {
      ...list,
      items: list.items.map((job) => ({
        ...job,
        parts: parts
          .filter((part) => part.jobId === job.jobId)
          .map(({ jobId: _, ...part }) => part),
      })),
    };
  });
}
