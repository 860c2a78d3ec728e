import { v7 as uuid } from 'uuid';
import { type Context } from '../../core/context';
import { nextNumber } from '../../core/counters';
import { row, withTenant, write } from '../../core/database/tenancy';
import { type AnswerOf, type InputOf } from '../../core/http/route';
import { announce } from '../../core/live/live';
import { found, invalid, problem } from '../../core/problems/problem';
import { refuseOtherStore } from '../stores/own-store';
import { showCall } from './read-calls';

/** Writes down a fault somebody reports, before anybody goes. */
export function reportCall(
  context: Context,
  body: InputOf<'calls.report'>['body'],
): Promise<AnswerOf<'calls.report'>> {
  return withTenant(context, async () => {
    refuseOtherStore(context, body.storeId);
    const store = found(
      await row<{ clientId: string; endedAt: Date | null }>(
        `select client_id as "clientId", ended_at as "endedAt" from stores
         where shop_id = $shopId and id = $storeId`,
        { shopId: context.shopId, storeId: body.storeId },
      ),
    );
    if (store.endedAt) throw problem('conflict', 'The shop does not work for this store any more.');
    if (body.machineId) await refuseForeignMachine(context, body.storeId, body.machineId);
    const id = uuid();
    const via = reportedVia(context);
    await write(
      `insert into calls (shop_id, id, client_id, store_id, machine_id, number, symptom, words,
         reported_by, reported_via, created_at)
       values ($shopId, $id, $clientId, $storeId, $machineId, $number, $symptom, $words,
         $reportedBy, $via, $now)`,
      {
        shopId: context.shopId,
        id,
        clientId: store.clientId,
        storeId: body.storeId,
        machineId: body.machineId ?? null,
        number: await nextNumber(context, 'call'),
        symptom: body.symptom,
        words: body.words,
        reportedBy: via === 'client' ? context.name : (body.reportedBy ?? context.name),
        via,
        now: context.now,
      },
    );
    await announce(context, 'call', id, store.clientId);
    return showCall(context, id);
  });
}

function reportedVia(context: Context): 'office' | 'tech' | 'client' {
  if (context.clientId !== null) return 'client';
  return context.role === 'tech' ? 'tech' : 'office';
}

/** A machine of another store, or one taken out for good, is as wrong as one that is not there. */
export async function refuseForeignMachine(
  context: Context,
  storeId: string,
  machineId: string,
): Promise<void> {
  const machine = await row(
    `select 1 from machines where shop_id = $shopId and id = $machineId and store_id = $storeId
       and state <> 'retired'`,
    { shopId: context.shopId, machineId, storeId },
  );
  if (!machine) {
    throw invalid([{ pointer: '/machineId', detail: 'is not a machine of this store' }]);
  }
}
