import { v7 as uuid } from 'uuid';
import { record } from '../../core/audit';
import { type Context } from '../../core/context';
import { changes } from '../../core/database/changes';
import { row, withTenant, write } from '../../core/database/tenancy';
import { type AnswerOf, type InputOf } from '../../core/http/route';
import { announce } from '../../core/live/live';
import { invalid, problem } from '../../core/problems/problem';
import { orStale } from '../../core/versions';
import { countUsage } from '../subscription/plan-limits';
import { freeNumber, numberTaken } from './free-number';
import { showClient } from './read-clients';

type Client = AnswerOf<'clients.show'>;

const columns = {
  name: 'name',
  number: 'number',
  termsDays: 'terms_days',
  taxExempt: 'tax_exempt',
  taxExemptReference: 'tax_exempt_reference',
  overrides: 'overrides',
  note: 'note',
};

export function createClient(
  context: Context,
  body: InputOf<'clients.create'>['body'],
): Promise<Client> {
  return withTenant(context, async () => {
    if (body.number) await refuseTaken(context, body.number, null);
    const id = uuid();
    await write(
      `insert into clients (shop_id, id, name, number, terms_days, tax_exempt, tax_exempt_reference,
         overrides, note)
       values ($shopId, $id, $name, $number, $termsDays, $taxExempt, $reference, $overrides, $note)`,
      {
        shopId: context.shopId,
        id,
        name: body.name,
        number: body.number ?? (await freeNumber(context, 'clients')),
        termsDays: body.termsDays ?? null,
        taxExempt: body.taxExempt ?? false,
        reference: body.taxExemptReference ?? '',
        overrides: JSON.stringify(body.overrides ?? {}),
        note: body.note ?? '',
      },
    );
    await noteChange(context, 'client added', id);
    return showClient(context, id);
  });
}

export function changeClient(
  context: Context,
  clientId: string,
  version: number,
  body: InputOf<'clients.change'>['body'],
): Promise<Client> {
  return withTenant(context, async () => {
    if (body.number) await refuseTaken(context, body.number, clientId);
    const { set, bind } = changes(body, columns);
    await update(context, clientId, version, set, bind);
    await noteChange(context, 'client changed', clientId, { fields: Object.keys(body) });
    return showClient(context, clientId);
  });
}

/** Ends the client and its stores, unless somebody is still to go there. */
export function endClient(context: Context, clientId: string, version: number): Promise<Client> {
  return withTenant(context, async () => {
    await update(context, clientId, version, 'ended_at = $now', { now: context.now });
    const bind = { shopId: context.shopId, clientId };
    const visits = await row(
      `select 1 from visits where shop_id = $shopId and client_id = $clientId
         and state in ('planned', 'confirmed', 'in_process') limit 1`,
      bind,
    );
    if (visits) throw problem('conflict', 'A visit is planned there: cancel or finish it first.');
    await write(
      `update stores set ended_at = $now
       where shop_id = $shopId and client_id = $clientId and ended_at is null`,
      { ...bind, now: context.now },
    );
    await countUsage(context);
    await noteChange(context, 'client ended', clientId);
    return showClient(context, clientId);
  });
}

export function resumeClient(context: Context, clientId: string, version: number): Promise<Client> {
  return withTenant(context, async () => {
    await update(context, clientId, version, 'ended_at = null', {});
    await noteChange(context, 'client resumed', clientId);
    return showClient(context, clientId);
  });
}

async function update(
  context: Context,
  clientId: string,
  version: number,
  set: string,
  bind: Record<string, unknown>,
): Promise<void> {
  const key = { shopId: context.shopId, clientId };
  await orStale(
    await write(
      `update clients set ${set} where shop_id = $shopId and id = $clientId and version = $version
       returning id`,
      { ...bind, ...key, version },
    ),
    () => row('select 1 from clients where shop_id = $shopId and id = $clientId', key),
  );
}

async function refuseTaken(context: Context, number: string, exceptId: string | null) {
  if (await numberTaken(context, 'clients', number, exceptId)) {
    throw invalid([{ pointer: '/number', detail: 'is the number of another client' }]);
  }
}

async function noteChange(
  context: Context,
  what: string,
  clientId: string,
  details: Record<string, unknown> = {},
): Promise<void> {
  await record(context, what, { kind: 'client', id: clientId }, details);
  await announce(context, 'clients', clientId, clientId);
}
