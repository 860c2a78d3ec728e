import { addDays, tradeDayOf } from '@lib/domain';
import { v7 as uuid } from 'uuid';
import { type Context } from '../../core/context';
import { rows, withTenant, write } from '../../core/database/tenancy';
import { shopFacts } from '../../core/shop-facts';
import { addVisit } from '../visits/plan-visit';
import { type Closures, showClosures } from './closures';
import { type RoundDay, type RoundRule, roundsBetween } from './next-rounds';

/** How far ahead rounds are planned, so that a day sheet shows them in time. */
const horizonDays = 35;
/** How far back a sweep looks: after that long without a worker a round is better agreed anew. */
const lookBackDays = 7;
const visitMinutes = 120;

interface Contract extends RoundRule {
  id: string;
  clientId: string;
  startTime: string;
  techMembershipId: string | null;
  /** The first day a sweep may plan: a contract agreed today plans nothing for yesterday. */
  agreedOn: string;
}

/** Plans what falls due within the horizon: of one contract, or of all that run. */
export function planRounds(context: Context, contractId: string | null = null): Promise<number> {
  return withTenant(context, async () => {
    const shop = await shopFacts(context);
    const today = tradeDayOf(context.now, shop.zone);
    const closures = await showClosures(context);
    let planned = 0;
    for (const contract of await runningContracts(context, contractId, today, shop.zone)) {
      const due = roundsDue(contract, closures, today);
      if (due.length) planned += await planContract(context, contract, due, today);
    }
    return planned;
  });
}

function roundsDue(contract: Contract, closures: Closures, today: string): RoundDay[] {
  const back = addDays(today, -lookBackDays);
  const from = contract.agreedOn > back ? contract.agreedOn : back;
  return roundsBetween(contract, closures, { from, to: addDays(today, horizonDays), limit: 100 });
}

function runningContracts(
  context: Context,
  contractId: string | null,
  today: string,
  zone: string,
): Promise<Contract[]> {
  return rows<Contract>(
    `select c.id, c.client_id as "clientId", c.rule, c.starts_on as "startsOn",
       c.ends_on as "endsOn", c.start_time as "startTime", c.shift,
       (select m.id from memberships m where m.shop_id = c.shop_id and m.id = c.tech_membership_id
          and m.ended_at is null) as "techMembershipId",
       (c.created_at at time zone $zone)::date as "agreedOn"
     from contracts c
     where c.shop_id = $shopId and ($contractId::uuid is null or c.id = $contractId::uuid)
       and c.starts_on <= $horizon and (c.ends_on is null or c.ends_on >= $back)
     order by c.number`,
    {
      shopId: context.shopId,
      contractId,
      zone,
      horizon: addDays(today, horizonDays),
      back: addDays(today, -lookBackDays),
    },
  );
}

async function planContract(
  context: Context,
  contract: Contract,
  due: readonly RoundDay[],
  today: string,
): Promise<number> {
  const stores = await rows<{ storeId: string }>(
    `select cs.store_id as "storeId" from contract_stores cs
     join stores s on s.shop_id = cs.shop_id and s.id = cs.store_id and s.ended_at is null
     where cs.shop_id = $shopId and cs.contract_id = $contractId order by s.number`,
    { shopId: context.shopId, contractId: contract.id },
  );
  let planned = 0;
  for (const day of due) {
    for (const { storeId } of stores) {
      if (await planRound(context, contract, storeId, day, today)) planned += 1;
    }
  }
  return planned;
}

/** The rule's day is the key: whoever plans a round again, however shifted, finds it planned. */
async function planRound(
  context: Context,
  contract: Contract,
  storeId: string,
  day: RoundDay,
  today: string,
): Promise<boolean> {
  const plannedOn = day.plannedOn < today ? today : day.plannedOn;
  const [round] = await write<{ id: string }>(
    `insert into rounds (shop_id, id, client_id, contract_id, store_id, due_on, planned_on)
     values ($shopId, $id, $clientId, $contractId, $storeId, $dueOn, $plannedOn)
     on conflict (shop_id, contract_id, store_id, due_on) do nothing returning id`,
    {
      shopId: context.shopId,
      id: uuid(),
      clientId: contract.clientId,
      contractId: contract.id,
      storeId,
      dueOn: day.dueOn,
      plannedOn,
    },
  );
  if (!round) return false;
  const visitId = await addVisit(context, {
    storeId,
    plannedOn,
    window: { from: contract.startTime, until: later(contract.startTime) },
    techMembershipId: contract.techMembershipId,
    callIds: [],
    reason: 'Maintenance round',
    roundId: round.id,
  });
  await write('update rounds set visit_id = $visitId where shop_id = $shopId and id = $id', {
    shopId: context.shopId,
    id: round.id,
    visitId,
  });
  return true;
}

function later(time: string): string {
  const [hours = 0, minutes = 0] = time.split(':').map(Number);
  const end = Math.min(hours * 60 + minutes + visitMinutes, 23 * 60 + 59);
  return `${String(Math.floor(end / 60)).padStart(2, '0')}:${String(end % 60).padStart(2, '0')}`;
}
