import { v7 as uuid } from 'uuid';
import { record } from '../../core/audit';
import { type Context } from '../../core/context';
import { changes } from '../../core/database/changes';
import { type Bind, row, withTenant, write } from '../../core/database/tenancy';
import { type AnswerOf, type InputOf } from '../../core/http/route';
import { announce } from '../../core/live/live';
import { found, invalid } from '../../core/problems/problem';
import { orStale } from '../../core/versions';
import { refuseOtherStore } from '../stores/own-store';
import { type Condition, conditionsOf } from './read-conditions';

export function listConditions(
  context: Context,
  storeId: string,
  show: InputOf<'conditions.list'>['query']['show'],
): Promise<AnswerOf<'conditions.list'>> {
  return withTenant(context, async () => {
    refuseOtherStore(context, storeId);
    found(
      await row('select 1 from stores where shop_id = $shopId and id = $storeId', {
        shopId: context.shopId,
        storeId,
      }),
    );
    return { items: await conditionsOf(context, { storeId, show }) };
  });
}

export function createCondition(
  context: Context,
  body: InputOf<'conditions.create'>['body'],
): Promise<Condition> {
  return withTenant(context, async () => {
    const clientId = await clientOfPlace(context, body.storeId, body.machineId ?? null);
    const id = uuid();
    await write(
      `insert into conditions (shop_id, id, client_id, store_id, machine_id, kind, words,
         extra_minutes, tool)
       values ($shopId, $id, $clientId, $storeId, $machineId, $kind, $words, $extraMinutes, $tool)`,
      { ...body, shopId: context.shopId, id, clientId, machineId: body.machineId ?? null },
    );
    return noted(context, 'condition added', id);
  });
}

export function changeCondition(
  context: Context,
  conditionId: string,
  version: number,
  body: InputOf<'conditions.change'>['body'],
): Promise<Condition> {
  return withTenant(context, async () => {
    const { set, bind } = changes(body, {
      kind: 'kind',
      words: 'words',
      extraMinutes: 'extra_minutes',
      tool: 'tool',
    });
    await update(context, conditionId, version, set, bind);
    return noted(context, 'condition changed', conditionId);
  });
}

export function clearCondition(
  context: Context,
  conditionId: string,
  version: number,
): Promise<Condition> {
  return withTenant(context, async () => {
    await update(context, conditionId, version, 'cleared_at = coalesce(cleared_at, $now)', {
      now: context.now,
    });
    return noted(context, 'condition cleared', conditionId);
  });
}

async function clientOfPlace(
  context: Context,
  storeId: string,
  machineId: string | null,
): Promise<string> {
  const bind = { shopId: context.shopId, storeId };
  const store = await row<{ client_id: string }>(
    'select client_id from stores where shop_id = $shopId and id = $storeId',
    bind,
  );
  if (!store) throw invalid([{ pointer: '/storeId', detail: 'is no store of the shop' }]);
  if (machineId !== null) {
    const machine = await row(
      'select 1 from machines where shop_id = $shopId and store_id = $storeId and id = $machineId',
      { ...bind, machineId },
    );
    if (!machine) throw invalid([{ pointer: '/machineId', detail: 'is no machine of the store' }]);
  }
  return store.client_id;
}

async function update(
  context: Context,
  conditionId: string,
  version: number,
  set: string,
  bind: Bind,
): Promise<void> {
  const key = { shopId: context.shopId, conditionId };
  await orStale(
    await write(
      `update conditions set ${set}
       where shop_id = $shopId and id = $conditionId and version = $version returning id`,
      { ...bind, ...key, version },
    ),
    () => row('select 1 from conditions where shop_id = $shopId and id = $conditionId', key),
  );
}

async function noted(context: Context, what: string, conditionId: string): Promise<Condition> {
  const [condition] = await conditionsOf(context, { conditionId, show: 'all' });
  await record(context, what, { kind: 'condition', id: conditionId });
  await announce(context, 'conditions', conditionId, null);
  return found(condition);
}
