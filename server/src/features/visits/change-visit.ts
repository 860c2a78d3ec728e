import { type VisitState } from '@lib/contracts';
import { record } from '../../core/audit';
import { type Context } from '../../core/context';
import { changes } from '../../core/database/changes';
import { type Bind, row, withTenant, write } from '../../core/database/tenancy';
import { type AnswerOf, type InputOf } from '../../core/http/route';
import { announce } from '../../core/live/live';
import { found, problem } from '../../core/problems/problem';
import { orStale } from '../../core/versions';
import { refuseOutsider, windowAt } from './plan-visit';
import { showVisit } from './read-visits';
import { setCalls } from './visit-calls';

type Shown = AnswerOf<'visits.show'>;

/** Moves a visit, assigns it, or changes what it is for. Once somebody is there, only the tech. */
export function changeVisit(
  context: Context,
  visitId: string,
  version: number,
  body: InputOf<'visits.change'>['body'],
): Promise<Shown> {
  return withTenant(context, async () => {
    const visit = await visitToChange(context, visitId);
    const { window, callIds, ...rest } = body;
    const movesOrCalls = window !== undefined || callIds || body.plannedOn !== undefined;
    if (visit.state === 'cancelled' || visit.state === 'completed') {
      throw problem('conflict', `The visit is ${visit.state}.`);
    }
    if (visit.state === 'in_process' && movesOrCalls) {
      throw problem(
        'conflict',
        'Somebody is at the store: the day and the calls stay as they are.',
      );
    }
    if (body.techMembershipId) await refuseOutsider(context, body.techMembershipId);
    if (callIds) await setCalls(context, visit, callIds);
    const { set, bind } = changes(rest, {
      plannedOn: 'planned_on',
      techMembershipId: 'tech_membership_id',
      reason: 'reason',
    });
    await update(context, visitId, version, `${set}${moved(visit, body, bind)}`, bind);
    await record(
      context,
      `visit ${visit.number} changed`,
      { kind: 'visit', id: visitId },
      {
        fields: Object.keys(body),
      },
    );
    await announce(context, 'visit', visitId, visit.clientId);
    return showVisit(context, visitId);
  });
}

/** A window keeps its hours when the visit moves to another day. A moved visit is to be confirmed anew. */
function moved(visit: VisitToChange, body: InputOf<'visits.change'>['body'], bind: Bind): string {
  const toAnotherDay = body.plannedOn !== undefined && body.plannedOn !== visit.plannedOn;
  if (!toAnotherDay && body.window === undefined) return '';
  const day = body.plannedOn ?? visit.plannedOn;
  const hours = visit.from && visit.until ? { from: visit.from, until: visit.until } : null;
  const window = body.window === undefined ? hours : body.window;
  Object.assign(bind, windowAt(day, window, visit.zone));
  const unconfirmed = toAnotherDay ? `, state = 'planned', confirmed_at = null` : '';
  return `, window_start = $windowStart, window_end = $windowEnd${unconfirmed}`;
}

export function confirmVisit(context: Context, visitId: string, version: number): Promise<Shown> {
  return withTenant(context, async () => {
    const visit = await visitToChange(context, visitId);
    if (visit.state !== 'planned') throw problem('conflict', `The visit is ${said(visit.state)}.`);
    await update(context, visitId, version, `state = 'confirmed', confirmed_at = $now`, {
      now: context.now,
    });
    await record(context, `visit ${visit.number} confirmed`, { kind: 'visit', id: visitId });
    await announce(context, 'visit', visitId, visit.clientId);
    return showVisit(context, visitId);
  });
}

/** Cancels a visit on which no machine was worked on; its calls wait for another one. */
export function cancelVisit(
  context: Context,
  visitId: string,
  version: number,
  words: string,
): Promise<Shown> {
  return withTenant(context, async () => {
    const visit = await visitToChange(context, visitId);
    if (visit.state === 'cancelled') throw problem('conflict', 'The visit is cancelled already.');
    if (visit.jobs > 0 || visit.ticketId) {
      throw problem('conflict', 'Machines were worked on: the visit stands.');
    }
    await update(context, visitId, version, `state = 'cancelled'`, {});
    await setCalls(context, visit, []);
    const subject = { kind: 'visit', id: visitId };
    await record(context, `visit ${visit.number} cancelled`, subject, { words });
    await announce(context, 'visit', visitId, visit.clientId);
    return showVisit(context, visitId);
  });
}

function said(state: VisitState): string {
  return state.replace('_', ' ');
}

interface VisitToChange {
  id: string;
  number: number;
  state: VisitState;
  storeId: string;
  clientId: string;
  plannedOn: string;
  /** Hours of the window on the clock of the store. */
  from: string | null;
  until: string | null;
  zone: string;
  jobs: number;
  ticketId: string | null;
}

async function visitToChange(context: Context, visitId: string): Promise<VisitToChange> {
  return found(
    await row<VisitToChange>(
      `select v.id, v.number, v.state, v.store_id as "storeId", v.client_id as "clientId",
         v.planned_on as "plannedOn", z.zone, v.ticket_id as "ticketId",
         to_char(v.window_start at time zone z.zone, 'HH24:MI') as from,
         to_char(v.window_end at time zone z.zone, 'HH24:MI') as until,
         (select count(*)::int from jobs j where j.shop_id = v.shop_id and j.visit_id = v.id) as jobs
       from visits v
       join stores s on s.shop_id = v.shop_id and s.id = v.store_id
       join shops h on h.id = v.shop_id
       cross join lateral (select coalesce(s.zone, h.zone) as zone) z
       where v.shop_id = $shopId and v.id = $visitId for update of v`,
      { shopId: context.shopId, visitId },
    ),
  );
}

async function update(context: Context, visitId: string, version: number, set: string, bind: Bind) {
  const all = { ...bind, shopId: context.shopId, visitId };
  await orStale(
    await write(
      `update visits set ${set}
       where shop_id = $shopId and id = $visitId and version = $version returning version`,
      { ...all, version },
    ),
    () => row('select 1 from visits where shop_id = $shopId and id = $visitId', all),
  );
}
