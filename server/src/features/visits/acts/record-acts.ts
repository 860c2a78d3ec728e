import { type Act, type VisitState } from '@lib/contracts';
import { type Context } from '../../../core/context';
import { row, rows, withTenant, write } from '../../../core/database/tenancy';
import { type AnswerOf } from '../../../core/http/route';
import { found } from '../../../core/problems/problem';
import { proposeRulings } from '../../rulings/propose-rulings';
import { visitRow } from '../read-visits';
import { settleCalls } from '../visit-calls';
import { readFacts, storedActs, type VisitToRecord } from './read-facts';
import { type DatedAct } from './visit-record';
import { weighActs } from './weigh-acts';
import { writeProjection } from './write-projection';

type Answer = AnswerOf<'acts.record'>;
type Result = Answer['results'][number];

/**
 * Records what happened on a visit. The visit's row is locked meanwhile, so that two phones take
 * turns; each act is stored at most once, and what follows from it changes in the same transaction.
 */
export function recordActs(
  context: Context,
  visitId: string,
  acts: readonly Act[],
): Promise<Answer> {
  return withTenant(context, async () => {
    const visit = await lockVisit(context, visitId);
    const before = await known(context, acts);
    const fresh = acts.filter((act, i) => !before.has(act.id) && firstOf(acts, act.id) === i);
    const answer = (
      refused: ReadonlyMap<string, string>,
      now: { state: string; version: number },
    ) => ({
      results: acts.map((act, i) => {
        const repeated = before.get(act.id) === visitId || firstOf(acts, act.id) !== i;
        if (repeated) return resultOf(act, 'repeated');
        const reason = before.has(act.id) ? 'This act is of another visit.' : refused.get(act.id);
        return reason === undefined ? resultOf(act, 'stored') : resultOf(act, 'refused', reason);
      }),
      visit: { id: visitId, state: now.state as VisitState, version: now.version },
    });
    if (fresh.length === 0) return answer(new Map(), visit);
    const stored = await storedActs(context, visitId);
    const outsider = refuseOutsider(context, visit, stored);
    if (outsider) return answer(new Map(fresh.map((act) => [act.id, outsider])), visit);
    const facts = await readFacts(context, visit, fresh);
    const weighed = weighActs(
      facts,
      stored,
      fresh.map((act, i) => dated(context, act, i)),
    );
    if (weighed.accepted.length === 0) return answer(weighed.refused, visit);
    await storeActs(context, visitId, weighed.accepted);
    const now = await writeProjection(context, visit, weighed.record, weighed.accepted);
    if (now.state === 'completed') {
      await settleCalls(context, visit);
      await proposeRulings(context, visitId);
    }
    return answer(weighed.refused, now);
  });
}

function firstOf(acts: readonly Act[], id: string): number {
  return acts.findIndex((act) => act.id === id);
}

function resultOf(act: Act, outcome: Result['outcome'], reason: string | null = null): Result {
  return { id: act.id, outcome, reason };
}

/** Arriving acts come after stored ones of the same instant, in the order they were sent. */
function dated(context: Context, act: Act, index: number): DatedAct {
  return {
    act,
    at: Date.parse(act.at),
    seq: Number.MAX_SAFE_INTEGER - 1000 + index,
    by: { membershipId: context.membershipId as string, name: context.name },
  };
}

async function lockVisit(context: Context, visitId: string): Promise<VisitToRecord> {
  return found(
    await row<VisitToRecord>(
      `select v.id, v.client_id as "clientId", v.store_id as "storeId", v.state, v.version,
         v.tech_membership_id as "techMembershipId",
         (select m.name from memberships m
          where m.shop_id = v.shop_id and m.id = v.tech_membership_id) as "techName",
         (select t.number from tickets t
          where t.shop_id = v.shop_id and t.id = v.ticket_id) as "ticketNumber"
       from visits v where v.shop_id = $shopId and v.id = $visitId for update`,
      { shopId: context.shopId, visitId },
    ),
  );
}

/** Which of the acts were stored before, and on which visit. */
async function known(context: Context, acts: readonly Act[]): Promise<Map<string, string>> {
  const before = await rows<{ id: string; visitId: string }>(
    `select id, visit_id as "visitId" from acts where shop_id = $shopId and id = any ($ids::uuid[])`,
    { shopId: context.shopId, ids: acts.map((act) => act.id) },
  );
  return new Map(before.map((act) => [act.id, act.visitId]));
}

/** A visit may go to another tech while a phone has no signal; whoever was there may finish. */
function refuseOutsider(
  context: Context,
  visit: VisitToRecord,
  stored: readonly DatedAct[],
): string | undefined {
  const { techMembershipId } = visit;
  if (context.role !== 'tech' || techMembershipId === null) return undefined;
  const { membershipId } = context;
  if (techMembershipId === membershipId) return undefined;
  if (stored.some((act) => act.by.membershipId === membershipId)) return undefined;
  return `The visit is ${visit.techName ?? 'somebody else'}’s by now. Tell the office.`;
}

async function storeActs(
  context: Context,
  visitId: string,
  accepted: readonly DatedAct[],
): Promise<void> {
  const values = accepted.map(({ act, at }, place) => ({
    id: act.id,
    kind: act.kind,
    payload: act.payload,
    at: new Date(at).toISOString(),
    place,
  }));
  await write(
    `insert into acts (shop_id, id, visit_id, kind, payload, by_membership_id, device_at, received_at)
     select $shopId, a.id, $visitId, a.kind, a.payload, $membershipId, a.at, $now
     from jsonb_to_recordset($acts::jsonb)
       as a (id uuid, kind text, payload jsonb, at timestamptz, place integer)
     order by a.place`,
    {
      shopId: context.shopId,
      visitId,
      membershipId: context.membershipId,
      now: context.now,
      acts: JSON.stringify(values),
    },
  );
}

/** Every act of a visit in the order it happened. */
export function listActs(context: Context, visitId: string): Promise<AnswerOf<'acts.list'>> {
  return withTenant(context, async () => {
    await visitRow(context, visitId);
    const acts = await rows<{
      id: string;
      kind: string;
      deviceAt: Date;
      receivedAt: Date;
      by: string;
      payload: Record<string, unknown>;
    }>(
      `select a.id, a.kind, a.device_at as "deviceAt", a.received_at as "receivedAt", m.name as by,
         a.payload
       from acts a join memberships m on m.shop_id = a.shop_id and m.id = a.by_membership_id
       where a.shop_id = $shopId and a.visit_id = $visitId order by a.device_at, a.seq`,
      { shopId: context.shopId, visitId },
    );
    return {
      items: acts.map(({ deviceAt, receivedAt, ...act }) => ({
        ...act,
        at: deviceAt.toISOString(),
        receivedAt: receivedAt.toISOString(),
      })),
    };
  });
}
