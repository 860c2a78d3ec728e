import { type CallState } from '@lib/contracts';
import { record } from '../../core/audit';
import { type Context } from '../../core/context';
import { changes } from '../../core/database/changes';
import { type Bind, row, withTenant, write } from '../../core/database/tenancy';
import { type AnswerOf, type InputOf } from '../../core/http/route';
import { announce } from '../../core/live/live';
import { found, problem } from '../../core/problems/problem';
import { orStale } from '../../core/versions';
import { ownStore } from '../stores/own-store';
import { showCall } from './read-calls';
import { refuseForeignMachine } from './report-call';

/** Puts right what was written down of a call, while nobody has worked on it. */
export function changeCall(
  context: Context,
  callId: string,
  version: number,
  body: InputOf<'calls.change'>['body'],
): Promise<AnswerOf<'calls.change'>> {
  return withTenant(context, async () => {
    const call = await callToChange(context, callId);
    if (call.state === 'closed' || call.state === 'withdrawn') {
      throw problem('conflict', `The call is ${call.state}.`);
    }
    if (body.machineId) await refuseForeignMachine(context, call.storeId, body.machineId);
    const { set, bind } = changes(body, {
      machineId: 'machine_id',
      symptom: 'symptom',
      words: 'words',
    });
    await update(context, callId, version, set, bind);
    await record(context, 'call changed', { kind: 'call', id: callId });
    await announce(context, 'call', callId, call.clientId);
    return showCall(context, callId);
  });
}

/** Takes a call back. Once a visit is planned for it, only the shop may. */
export function withdrawCall(
  context: Context,
  callId: string,
  version: number,
  words: string,
): Promise<AnswerOf<'calls.withdraw'>> {
  return withTenant(context, async () => {
    const call = await callToChange(context, callId);
    if (call.state === 'closed' || call.state === 'withdrawn') {
      throw problem('conflict', `The call is ${call.state} already.`);
    }
    if (call.state === 'planned' && (context.clientId !== null || call.worked)) {
      throw problem('conflict', 'Somebody is on the way for this call: ring the shop.');
    }
    await update(
      context,
      callId,
      version,
      `state = 'withdrawn', closed_at = $now, visit_id = null, planned_at = null`,
      { now: context.now },
    );
    await record(context, 'call withdrawn', { kind: 'call', id: callId }, { words });
    await announce(context, 'call', callId, call.clientId);
    if (call.visitId) await announce(context, 'visit', call.visitId, call.clientId);
    return showCall(context, callId);
  });
}

async function callToChange(context: Context, callId: string) {
  const bind: Bind = { shopId: context.shopId, callId };
  const own = ownStore(context, 'k.store_id', bind);
  return found(
    await row<{
      state: CallState;
      storeId: string;
      clientId: string;
      visitId: string | null;
      worked: boolean;
    }>(
      `select k.state, k.store_id as "storeId", k.client_id as "clientId",
         k.visit_id as "visitId",
         exists (select 1 from jobs j where j.shop_id = k.shop_id and j.visit_id = k.visit_id
           and j.call_id = k.id) as worked
       from calls k where ${['k.shop_id = $shopId', 'k.id = $callId', ...own].join(' and ')}`,
      bind,
    ),
  );
}

async function update(context: Context, callId: string, version: number, set: string, bind: Bind) {
  const all = { ...bind, shopId: context.shopId, callId };
  await orStale(
    await write(
      `update calls set ${set}
       where shop_id = $shopId and id = $callId and version = $version returning version`,
      { ...all, version },
    ),
    () => row('select 1 from calls where shop_id = $shopId and id = $callId', all),
  );
}
