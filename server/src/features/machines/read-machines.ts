import { type Context } from '../../core/context';
import { type Bind, row, rows, withTenant } from '../../core/database/tenancy';
import { type AnswerOf, type InputOf } from '../../core/http/route';
import { page, searched, type SortKey } from '../../core/lists/keyset';
import { found } from '../../core/problems/problem';
import { ownClient, ownStore } from '../stores/own-store';
import {
  machineColumns,
  machineFrom,
  type MachineRow,
  machineSummaryColumns,
  machineSummaryFrom,
  presentMachine,
  presentMachineSummary,
} from './machine-row';
import { conditionsOf } from './read-conditions';

type Query = InputOf<'machines.list'>['query'];

const sorts: Record<Query['sort'], SortKey> = {
  bay: { column: 'm.bay', type: 'text' },
  serial: { column: 'm.serial', type: 'text' },
  '-stateSince': { column: 'm.state_since', type: 'timestamptz', descending: true },
};

export function listMachines(context: Context, query: Query): Promise<AnswerOf<'machines.list'>> {
  return withTenant(context, () => {
    const bind: Bind = { shopId: context.shopId };
    return page<MachineRow, AnswerOf<'machines.list'>['items'][number]>(
      {
        select: `select ${machineSummaryColumns} from ${machineSummaryFrom}`,
        from: machineSummaryFrom,
        where: [
          'm.shop_id = $shopId',
          ...ownClient(context, 'm.client_id', bind),
          ...ownStore(context, 'm.store_id', bind),
          ...filters(query, bind),
          ...searched(
            query.q,
            ['m.serial', 'm.make', 'm.model', 'm.bay', 'm.sticker_code', 's.name'],
            bind,
          ),
        ],
        bind,
        sort: sorts[query.sort],
        id: 'm.id',
        limit: query.limit,
        cursor: query.cursor,
      },
      (machine) => presentMachineSummary(context, machine),
    );
  });
}

function filters(query: Query, bind: Bind): string[] {
  const where = [stateFilter(query, bind)];
  if (query.clientId) {
    bind.clientId = query.clientId;
    where.push('m.client_id = $clientId');
  }
  if (query.storeId) {
    bind.storeId = query.storeId;
    where.push('m.store_id = $storeId');
  }
  if (query.kind) {
    bind.kind = query.kind;
    where.push('m.kind = $kind');
  }
  return where;
}

function stateFilter(query: Query, bind: Bind): string {
  if (!query.state) return "m.state <> 'retired'";
  if (query.state === 'not_up') return "m.state in ('degraded', 'down', 'locked_out')";
  bind.state = query.state;
  return 'm.state = $state';
}

export function showMachine(
  context: Context,
  machineId: string,
): Promise<AnswerOf<'machines.show'>> {
  return withTenant(context, async () => {
    const bind: Bind = { shopId: context.shopId, machineId };
    const own = ownStore(context, 'm.store_id', bind);
    const machine = found(
      await row<MachineRow>(
        `select ${machineColumns} from ${machineFrom}
         where ${['m.shop_id = $shopId', 'm.id = $machineId', ...own].join(' and ')}`,
        bind,
      ),
    );
    return presentMachine(context, machine, {
      conditions: await conditionsOf(context, { machineId, show: 'open' }),
      jobs: await lastJobs(context, machineId),
    });
  });
}

/** What was done to the machine, wherever it stood then. */
function lastJobs(context: Context, machineId: string): Promise<AnswerOf<'machines.show'>['jobs']> {
  return rows(
    `select j.id as "jobId", v.id as "visitId", v.number as "visitNumber", j.position,
       v.planned_on as on, j.finding, j.cause, j.action, j.result, t.number as "ticketNumber"
     from jobs j
     join visits v on v.shop_id = j.shop_id and v.id = j.visit_id
     left join tickets t on t.shop_id = v.shop_id and t.id = v.ticket_id
     where j.shop_id = $shopId and j.machine_id = $machineId and v.state <> 'cancelled'
     order by j.created_at desc, j.id desc limit 20`,
    { shopId: context.shopId, machineId },
  );
}
