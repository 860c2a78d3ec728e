import { type CallState, type MachineKind, type Symptom } from '@lib/contracts';
import { type Context } from '../../core/context';
import { type Bind, row, rows, withTenant } from '../../core/database/tenancy';
import { instantOrNull } from '../../core/database/times';
import { type AnswerOf, type InputOf } from '../../core/http/route';
import { filtered } from '../../core/lists/filtered';
import { page, searched } from '../../core/lists/keyset';
import { found } from '../../core/problems/problem';
import { visitWords } from '../statements/visit-words';
import { openItemsLeftBy } from './read-open-items';
import { jobsOfVisits } from './read-jobs';
import {
  ownVisits,
  presentVisit,
  visitFrom,
  type VisitItem,
  type VisitRow,
  visitSelect,
} from './visit-row';

type Shown = AnswerOf<'visits.show'>;
export type VisitCall = Shown['callList'][number];

const stateConditions: Record<string, string> = {
  live: `v.state in ('planned', 'confirmed', 'in_process')`,
  unticketed: `v.state = 'completed' and v.ticket_id is null`,
};

export function listVisits(
  context: Context,
  query: InputOf<'visits.list'>['query'],
): Promise<AnswerOf<'visits.list'>> {
  return withTenant(context, () => {
    const bind: Bind = { shopId: context.shopId };
    const where = [
      'v.shop_id = $shopId',
      ...ownVisits(context, bind),
      ...searched(query.q, ['v.number::text', 's.name', 'c.name', 'v.reason'], bind),
      ...filtered(
        query,
        {
          techMembershipId: 'v.tech_membership_id',
          storeId: 'v.store_id',
          clientId: 'v.client_id',
        },
        bind,
      ),
    ];
    const ofState = query.state && stateConditions[query.state];
    where.push(...(ofState ? [ofState] : filtered(query, { state: 'v.state' }, bind)));
    if (query.from) {
      bind.from = query.from;
      where.push('v.planned_on >= $from');
    }
    if (query.until) {
      bind.until = query.until;
      where.push('v.planned_on <= $until');
    }
    if (query.machineId) {
      bind.machineId = query.machineId;
      where.push(`v.id in (
        select j.visit_id from jobs j where j.shop_id = $shopId and j.machine_id = $machineId
        union select x.visit_id from calls x where x.shop_id = $shopId and x.machine_id = $machineId)`);
    }
    return page<VisitRow, VisitItem>(
      {
        select: visitSelect,
        from: visitFrom,
        where,
        bind,
        sort: {
          column: 'v.planned_on',
          type: 'date',
          descending: query.sort === '-plannedOn',
        },
        id: 'v.id',
        limit: query.limit,
        cursor: query.cursor,
      },
      (visit) => presentVisit(context, visit),
    );
  });
}

/** The visit's row, if the person may see it. */
export async function visitRow(context: Context, visitId: string): Promise<VisitRow> {
  const bind: Bind = { shopId: context.shopId, visitId };
  const where = ['v.shop_id = $shopId', 'v.id = $visitId', ...ownVisits(context, bind)];
  return found(await row<VisitRow>(`${visitSelect} where ${where.join(' and ')}`, bind));
}

export function showVisit(context: Context, visitId: string): Promise<Shown> {
  return withTenant(context, async () => {
    const visit = await visitRow(context, visitId);
    const jobList = (await jobsOfVisits(context, [visitId])).get(visitId) ?? [];
    const ofClient = context.clientId !== null;
    return {
      ...presentVisit(context, visit),
      words: visitWords(jobList.map(({ machine, result }) => ({ bay: machine.bay, result }))),
      receivedBy: visit.receivedBy,
      callList: (await callsOfVisits(context, [visitId])).get(visitId) ?? [],
      jobList,
      handedOver: await openItemsLeftBy(context, visitId),
      times: ofClient ? [] : await timesOf(context, visitId),
      rulings: ofClient || context.role === 'tech' ? null : await rulingsOf(context, visitId),
    };
  });
}

interface CallRow {
  visitId: string;
  id: string;
  number: number;
  machineId: string | null;
  bay: string | null;
  kind: MachineKind | null;
  make: string | null;
  model: string | null;
  symptom: Symptom;
  words: string;
  state: CallState;
  reportedBy: string;
  reportedAt: Date;
  version: number;
}

/** The calls each visit is for. */
export async function callsOfVisits(
  context: Context,
  visitIds: readonly string[],
): Promise<Map<string, VisitCall[]>> {
  const calls = await rows<CallRow>(
    `select k.visit_id as "visitId", k.id, k.number, m.id as "machineId", m.bay, m.kind, m.make,
       m.model, k.symptom, k.words, k.state, k.reported_by as "reportedBy",
       k.created_at as "reportedAt", k.version
     from calls k left join machines m on m.shop_id = k.shop_id and m.id = k.machine_id
     where k.shop_id = $shopId and k.visit_id = any ($visitIds::uuid[])
     order by k.number`,
    { shopId: context.shopId, visitIds },
  );
  const byVisit = new Map<string, VisitCall[]>();
  for (const { visitId, machineId, bay, kind, make, model, reportedAt, ...call } of calls) {
    const machine =
      machineId !== null && bay !== null && kind !== null
        ? { id: machineId, bay, kind, make: make ?? '', model: model ?? '' }
        : null;
    const item = { ...call, machine, reportedAt: reportedAt.toISOString() };
    byVisit.set(visitId, [...(byVisit.get(visitId) ?? []), item]);
  }
  return byVisit;
}

async function timesOf(context: Context, visitId: string): Promise<Shown['times']> {
  const times = await rows<{ name: string; arrivedAt: Date; leftAt: Date | null }>(
    `select p.name, t.arrived_at as "arrivedAt", t.left_at as "leftAt"
     from visit_times t join memberships p on p.shop_id = t.shop_id and p.id = t.membership_id
     where t.shop_id = $shopId and t.visit_id = $visitId order by t.arrived_at, t.id`,
    { shopId: context.shopId, visitId },
  );
  return times.map(({ name, arrivedAt, leftAt }) => ({
    name,
    arrivedAt: arrivedAt.toISOString(),
    leftAt: instantOrNull(leftAt),
  }));
}

/** Lines that were ruled on, and how many of them wait for the owner. */
async function rulingsOf(context: Context, visitId: string): Promise<Shown['rulings']> {
  const counted = await row<{ lines: number; waiting: number }>(
    `select count(*)::int as lines,
       count(*) filter (where r.step = 'proposed' and r.needs_confirmation)::int as waiting
     from (select distinct on (line_key) line_key, step, needs_confirmation, basis from rulings
       where shop_id = $shopId and visit_id = $visitId order by line_key, id desc) r
     where r.basis <> 'gone'`,
    { shopId: context.shopId, visitId },
  );
  return counted ?? { lines: 0, waiting: 0 };
}
