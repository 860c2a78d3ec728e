import { validateRule } from '@lib/domain';
import { v7 as uuid } from 'uuid';
import { record } from '../../core/audit';
import { type Context } from '../../core/context';
import { nextNumber } from '../../core/counters';
import { row, rows, withTenant, write } from '../../core/database/tenancy';
import { type AnswerOf, type InputOf } from '../../core/http/route';
import { announce } from '../../core/live/live';
import { invalid } from '../../core/problems/problem';
import { orStale } from '../../core/versions';
import { refuseOutsider } from '../visits/plan-visit';
import { planRounds } from './plan-rounds';
import { showContract } from './read-contracts';

type Shown = AnswerOf<'contracts.show'>;
type Terms = InputOf<'contracts.change'>['body'];

export function createContract(
  context: Context,
  body: InputOf<'contracts.create'>['body'],
): Promise<Shown> {
  return withTenant(context, async () => {
    const client = await row(
      'select 1 from clients where shop_id = $shopId and id = $clientId and ended_at is null',
      { shopId: context.shopId, clientId: body.clientId },
    );
    if (!client) throw invalid([{ pointer: '/clientId', detail: 'is no client of the shop' }]);
    await checkTerms(context, body.clientId, body);
    const id = uuid();
    await write(
      `insert into contracts (shop_id, id, client_id, number, name, rule, starts_on, ends_on,
         start_time, shift, coverage, tech_membership_id, created_at)
       values ($shopId, $id, $clientId, $number, $name, $rule, $startsOn, $endsOn, $startTime,
         $shift, $coverage::jsonb, $techMembershipId, $now)`,
      {
        ...columnsOf(body),
        shopId: context.shopId,
        id,
        clientId: body.clientId,
        number: await nextNumber(context, 'contract'),
        now: context.now,
      },
    );
    await setStores(context, id, body.clientId, body);
    return settled(context, id, 'contract agreed');
  });
}

export function changeContract(
  context: Context,
  contractId: string,
  version: number,
  body: Terms,
): Promise<Shown> {
  return withTenant(context, async () => {
    const { clientId } = await lockContract(context, contractId, version);
    await checkTerms(context, clientId, body);
    await write(
      `update contracts set name = $name, rule = $rule, starts_on = $startsOn, ends_on = $endsOn,
         start_time = $startTime, shift = $shift, coverage = $coverage::jsonb,
         tech_membership_id = $techMembershipId
       where shop_id = $shopId and id = $id`,
      { ...columnsOf(body), shopId: context.shopId, id: contractId },
    );
    await setStores(context, contractId, clientId, body);
    return settled(context, contractId, 'contract changed');
  });
}

export function endContract(
  context: Context,
  contractId: string,
  version: number,
  endsOn: string,
): Promise<Shown> {
  return withTenant(context, async () => {
    const contract = await lockContract(context, contractId, version);
    if (endsOn < contract.startsOn) {
      throw invalid([{ pointer: '/endsOn', detail: 'is before the contract starts' }]);
    }
    await write(
      `update contracts set ends_on = $endsOn, ended_at = $now
       where shop_id = $shopId and id = $id`,
      { shopId: context.shopId, id: contractId, endsOn, now: context.now },
    );
    return settled(context, contractId, 'contract ended');
  });
}

function columnsOf(body: Terms) {
  return {
    name: body.name,
    rule: body.rule.toUpperCase().replace(/^RRULE:/, ''),
    startsOn: body.startsOn,
    endsOn: body.endsOn,
    startTime: body.startTime,
    shift: body.shift,
    coverage: JSON.stringify(body.coverage),
    techMembershipId: body.techMembershipId,
  };
}

async function lockContract(
  context: Context,
  contractId: string,
  version: number,
): Promise<{ clientId: string; startsOn: string }> {
  const bind = { shopId: context.shopId, contractId };
  const read = await rows<{ clientId: string; startsOn: string }>(
    `select client_id as "clientId", starts_on as "startsOn" from contracts
     where shop_id = $shopId and id = $contractId and version = $version for update`,
    { ...bind, version },
  );
  return orStale(read, () =>
    row('select 1 from contracts where shop_id = $shopId and id = $contractId', bind),
  );
}

async function checkTerms(context: Context, clientId: string, body: Terms): Promise<void> {
  const verdict = validateRule(body.rule, { date: body.startsOn });
  if (!verdict.valid) throw invalid([{ pointer: '/rule', detail: verdict.problem }]);
  if (body.endsOn && body.endsOn < body.startsOn) {
    throw invalid([{ pointer: '/endsOn', detail: 'is before the contract starts' }]);
  }
  const own = await rows<{ id: string }>(
    `select id from stores where shop_id = $shopId and client_id = $clientId
       and id = any ($storeIds::uuid[])`,
    { shopId: context.shopId, clientId, storeIds: body.stores.map((store) => store.storeId) },
  );
  const known = new Set(own.map((store) => store.id));
  const strange = body.stores.findIndex((store) => !known.has(store.storeId));
  if (strange >= 0) {
    throw invalid([{ pointer: `/stores/${strange}/storeId`, detail: 'is no store of the client' }]);
  }
  if (body.techMembershipId) await refuseOutsider(context, body.techMembershipId);
}

async function setStores(
  context: Context,
  contractId: string,
  clientId: string,
  body: Terms,
): Promise<void> {
  const bind = { shopId: context.shopId, contractId };
  await write(
    `delete from contract_stores where shop_id = $shopId and contract_id = $contractId
       and not (store_id = any ($storeIds::uuid[]))`,
    { ...bind, storeIds: body.stores.map((store) => store.storeId) },
  );
  for (const { storeId, monthlyFee } of body.stores) {
    await write(
      `insert into contract_stores (shop_id, id, client_id, contract_id, store_id, monthly_fee)
       values ($shopId, $id, $clientId, $contractId, $storeId, $monthlyFee)
       on conflict (shop_id, contract_id, store_id) do update set monthly_fee = $monthlyFee`,
      { ...bind, id: uuid(), clientId, storeId, monthlyFee },
    );
  }
}

/** What follows from the terms: rounds past the end are called off, those that fall due planned. */
async function settled(context: Context, contractId: string, what: string): Promise<Shown> {
  await callOffPastEnd(context, contractId);
  await planRounds(context, contractId);
  await record(context, what, { kind: 'contract', id: contractId });
  const shown = await showContract(context, contractId);
  await announce(context, 'contract', contractId, shown.clientId);
  return shown;
}

async function callOffPastEnd(context: Context, contractId: string): Promise<void> {
  const bind = { shopId: context.shopId, contractId };
  const visits = await write<{ id: string; clientId: string }>(
    `update visits v set state = 'cancelled'
     from rounds r join contracts k on k.shop_id = r.shop_id and k.id = r.contract_id
     where r.shop_id = $shopId and r.contract_id = $contractId and r.due_on > k.ends_on
       and v.shop_id = r.shop_id and v.id = r.visit_id and v.state in ('planned', 'confirmed')
     returning v.id, v.client_id as "clientId"`,
    bind,
  );
  await write(
    `update rounds r set state = 'skipped' from visits v
     where r.shop_id = $shopId and r.contract_id = $contractId and r.state = 'planned'
       and v.shop_id = r.shop_id and v.id = r.visit_id and v.state = 'cancelled'`,
    bind,
  );
  for (const { id, clientId } of visits) await announce(context, 'visit', id, clientId);
}
