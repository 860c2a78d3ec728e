import { instantAt } from '@lib/domain';
import { v7 as uuid } from 'uuid';
import { record } from '../../core/audit';
import { type Context } from '../../core/context';
import { nextNumber } from '../../core/counters';
import { row, withTenant, write } from '../../core/database/tenancy';
import { type AnswerOf, type InputOf } from '../../core/http/route';
import { announce } from '../../core/live/live';
import { found, invalid, problem } from '../../core/problems/problem';
import { showVisit } from './read-visits';
import { setCalls } from './visit-calls';

export interface VisitToPlan {
  storeId: string;
  plannedOn: string;
  window?: { from: string; until: string } | null | undefined;
  techMembershipId?: string | null | undefined;
  callIds: readonly string[];
  reason: string;
  /** The maintenance round it is. */
  roundId?: string | null;
}

/** Plans a visit in the open tenant transaction and answers with its id. */
export async function addVisit(context: Context, plan: VisitToPlan): Promise<string> {
  const store = found(
    await row<{ clientId: string; endedAt: Date | null; zone: string }>(
      `select s.client_id as "clientId", s.ended_at as "endedAt", coalesce(s.zone, h.zone) as zone
       from stores s join shops h on h.id = s.shop_id
       where s.shop_id = $shopId and s.id = $storeId`,
      { shopId: context.shopId, storeId: plan.storeId },
    ),
  );
  if (store.endedAt) throw problem('conflict', 'The shop does not work for this store any more.');
  if (plan.techMembershipId) await refuseOutsider(context, plan.techMembershipId);
  const id = uuid();
  const window = windowAt(plan.plannedOn, plan.window, store.zone);
  const number = await nextNumber(context, 'visit');
  await write(
    `insert into visits (shop_id, id, client_id, store_id, number, tech_membership_id, planned_on,
       window_start, window_end, reason, round_id, created_at)
     values ($shopId, $id, $clientId, $storeId, $number, $techMembershipId, $plannedOn,
       $windowStart, $windowEnd, $reason, $roundId, $now)`,
    {
      shopId: context.shopId,
      id,
      clientId: store.clientId,
      storeId: plan.storeId,
      number,
      techMembershipId: plan.techMembershipId ?? null,
      plannedOn: plan.plannedOn,
      ...window,
      reason: plan.reason,
      roundId: plan.roundId ?? null,
      now: context.now,
    },
  );
  await setCalls(context, { id, storeId: plan.storeId, clientId: store.clientId }, plan.callIds);
  await record(context, `visit ${number} planned`, { kind: 'visit', id });
  await announce(context, 'visit', id, store.clientId);
  return id;
}

export function planVisit(
  context: Context,
  body: InputOf<'visits.plan'>['body'],
): Promise<AnswerOf<'visits.plan'>> {
  return withTenant(context, async () => showVisit(context, await addVisit(context, body)));
}

/** The instants of a window on the clock of the store. */
export function windowAt(
  day: string,
  window: { from: string; until: string } | null | undefined,
  zone: string,
): { windowStart: string | null; windowEnd: string | null } {
  if (!window) return { windowStart: null, windowEnd: null };
  return {
    windowStart: instantAt(day, window.from, zone),
    windowEnd: instantAt(day, window.until, zone),
  };
}

/** Visits are for people of the shop, not of a client. */
export async function refuseOutsider(context: Context, membershipId: string): Promise<void> {
  const crew = await row(
    `select 1 from memberships where shop_id = $shopId and id = $membershipId and ended_at is null
       and role in ('shop_owner', 'office', 'tech')`,
    { shopId: context.shopId, membershipId },
  );
  if (!crew) {
    throw invalid([{ pointer: '/techMembershipId', detail: 'is nobody of the crew' }]);
  }
}
