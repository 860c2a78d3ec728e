import { type Context } from '../../core/context';
import { rows, write } from '../../core/database/tenancy';
import { announce } from '../../core/live/live';
import { invalid, problem } from '../../core/problems/problem';

interface VisitOfCalls {
  id: string;
  storeId: string;
  clientId: string;
}

/** Plans exactly these calls on a visit; calls it had and that are not among them are open again. */
export async function setCalls(
  context: Context,
  visit: VisitOfCalls,
  callIds: readonly string[],
): Promise<void> {
  const bind = { shopId: context.shopId, visitId: visit.id, callIds: [...new Set(callIds)] };
  const calls = await rows<{ id: string; state: string; visitId: string | null; number: number }>(
    `select id, state, visit_id as "visitId", number from calls
     where shop_id = $shopId and id = any ($callIds::uuid[]) and store_id = $storeId for update`,
    { ...bind, storeId: visit.storeId },
  );
  if (calls.length !== bind.callIds.length) {
    throw invalid([{ pointer: '/callIds', detail: 'names a call that is not of this store' }]);
  }
  for (const call of calls) {
    if (call.visitId === visit.id && call.state === 'planned') continue;
    if (call.state !== 'open') {
      throw problem('conflict', `Call ${call.number} is ${call.state} already.`);
    }
  }
  const freed = await write<{ id: string }>(
    `update calls set state = 'open', visit_id = null, planned_at = null
     where shop_id = $shopId and visit_id = $visitId and state = 'planned'
       and id <> all ($callIds::uuid[]) returning id`,
    bind,
  );
  const planned = await write<{ id: string }>(
    `update calls set state = 'planned', visit_id = $visitId, planned_at = $now
     where shop_id = $shopId and id = any ($callIds::uuid[]) and state = 'open' returning id`,
    { ...bind, now: context.now },
  );
  for (const { id } of [...freed, ...planned]) await announce(context, 'call', id, visit.clientId);
}

/**
 * What becomes of a completed visit's calls: those whose machine was put right, replaced or had
 * nothing wrong are closed; the others wait for another visit. Calls that went to another visit in
 * the meantime are left alone.
 */
export async function settleCalls(
  context: Context,
  visit: { id: string; clientId: string },
): Promise<void> {
  const changed = await write<{ id: string }>(
    `with settled as (
       select k.id, coalesce(bool_or(j.result in ('put_right', 'replaced', 'nothing_found')), false) as over,
         max(j.done_at) as done_at
       from calls k
       left join jobs j on j.shop_id = k.shop_id and j.visit_id = $visitId
         and (j.call_id = k.id or (j.call_id is null and j.machine_id = k.machine_id))
       where k.shop_id = $shopId and k.state in ('planned', 'closed', 'open')
         and (k.visit_id = $visitId or (k.visit_id is null and j.call_id = k.id))
       group by k.id)
     update calls k set state = case when s.over then 'closed' else 'open' end,
       closed_at = case when s.over then coalesce(s.done_at, $now) end,
       visit_id = case when s.over then $visitId::uuid end,
       planned_at = case when s.over then k.planned_at end
     from settled s
     where k.shop_id = $shopId and k.id = s.id
       and k.state is distinct from case when s.over then 'closed' else 'open' end
     returning k.id`,
    { shopId: context.shopId, visitId: visit.id, now: context.now },
  );
  for (const { id } of changed) await announce(context, 'call', id, visit.clientId);
}
