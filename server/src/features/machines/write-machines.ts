import { v7 as uuid } from 'uuid';
import { record } from '../../core/audit';
import { type Context } from '../../core/context';
import { changes } from '../../core/database/changes';
import { row, withTenant, write } from '../../core/database/tenancy';
import { type AnswerOf, type InputOf } from '../../core/http/route';
import { announce } from '../../core/live/live';
import { problem } from '../../core/problems/problem';
import { orStale } from '../../core/versions';
import { refusePastLimit, countUsage } from '../subscription/plan-limits';
import { freeBay } from './place-of-machine';
import { showMachine } from './read-machines';
import { stickerCode } from './sticker-code';

type Machine = AnswerOf<'machines.show'>;

const columns = {
  kind: 'kind',
  energy: 'energy',
  make: 'make',
  model: 'model',
  serial: 'serial',
  builtOn: 'built_on',
  installedOn: 'installed_on',
  volts: 'volts',
  amps: 'amps',
  vendPrice: 'vend_price',
  cyclesADay: 'cycles_a_day',
  supplierWarrantyUntil: 'supplier_warranty_until',
  note: 'note',
};

export function createMachine(
  context: Context,
  body: InputOf<'machines.create'>['body'],
): Promise<Machine> {
  return withTenant(context, async () => {
    await refusePastLimit(context, 'machines', 1);
    const place = await freeBay(context, body.bankId, body.bayNumber);
    const id = uuid();
    await write(
      `insert into machines (shop_id, id, client_id, store_id, bank_id, bay, bay_number, kind, energy,
         make, model, serial, built_on, installed_on, volts, amps, vend_price, cycles_a_day, state,
         state_since, sticker_code, supplier_warranty_until, note)
       values ($shopId, $id, $clientId, $storeId, $bankId, $bay, $bayNumber, $kind, $energy, $make,
         $model, $serial, $builtOn, $installedOn, $volts, $amps, $vendPrice, $cyclesADay, $state,
         $now, $sticker, $supplierWarrantyUntil, $note)`,
      {
        shopId: context.shopId,
        id,
        ...place,
        kind: body.kind,
        energy: body.energy ?? 'electric',
        make: body.make ?? '',
        model: body.model ?? '',
        serial: body.serial ?? '',
        builtOn: body.builtOn ?? null,
        installedOn: body.installedOn ?? null,
        volts: body.volts ?? null,
        amps: body.amps ?? null,
        vendPrice: body.vendPrice ?? 0,
        cyclesADay: body.cyclesADay ?? 0,
        state: body.state,
        now: context.now,
        sticker: stickerCode(),
        supplierWarrantyUntil: body.supplierWarrantyUntil ?? null,
        note: body.note ?? '',
      },
    );
    await countUsage(context);
    return noted(context, 'machine added', id);
  });
}

export function changeMachine(
  context: Context,
  machineId: string,
  version: number,
  body: InputOf<'machines.change'>['body'],
): Promise<Machine> {
  return withTenant(context, async () => {
    const { set, bind } = changes(body, columns);
    await update(context, machineId, version, set, bind);
    return noted(context, 'machine changed', machineId, { fields: Object.keys(body) });
  });
}

export function setMachineState(
  context: Context,
  machineId: string,
  version: number,
  body: InputOf<'machines.setState'>['body'],
): Promise<Machine> {
  return withTenant(context, async () => {
    const before = await lockMachine(context, machineId);
    if (before?.state === 'retired') throw problem('conflict', 'The machine is retired.');
    await update(
      context,
      machineId,
      version,
      'state = $state, state_since = case when state = $state then state_since else $now end',
      { state: body.state, now: context.now },
    );
    const details = { from: before?.state, to: body.state, words: body.words };
    return noted(context, 'machine state set', machineId, details);
  });
}

/** Takes the machine out for good: its bay becomes free, its history stays. */
export function retireMachine(
  context: Context,
  machineId: string,
  version: number,
  body: InputOf<'machines.retire'>['body'],
): Promise<Machine> {
  return withTenant(context, async () => {
    const before = await lockMachine(context, machineId);
    if (before?.state === 'retired') throw problem('conflict', 'The machine is retired already.');
    await update(context, machineId, version, "state = 'retired', state_since = $now", {
      now: context.now,
    });
    await refuseOpenCalls(context, machineId);
    await countUsage(context);
    const details = { from: before?.state, words: body.words };
    return noted(context, 'machine retired', machineId, details);
  });
}

/** What changes how work is done on the machine goes with it; what was done stays where it was. */
export function moveMachine(
  context: Context,
  machineId: string,
  version: number,
  body: InputOf<'machines.move'>['body'],
): Promise<Machine> {
  return withTenant(context, async () => {
    const before = await lockMachine(context, machineId);
    if (before?.state === 'retired') throw problem('conflict', 'The machine is retired.');
    const place = await freeBay(context, body.bankId, body.bayNumber);
    if (before && place.clientId !== before.client_id) {
      throw problem(
        'conflict',
        'The other store belongs to another client: retire the machine here.',
      );
    }
    await update(
      context,
      machineId,
      version,
      'store_id = $storeId, bank_id = $bankId, bay = $bay, bay_number = $bayNumber',
      {
        storeId: place.storeId,
        bankId: place.bankId,
        bay: place.bay,
        bayNumber: place.bayNumber,
      },
    );
    if (before && place.storeId !== before.store_id) {
      await refuseOpenCalls(context, machineId);
      await write(
        `update conditions set store_id = $storeId
         where shop_id = $shopId and machine_id = $machineId and cleared_at is null`,
        { shopId: context.shopId, machineId, storeId: place.storeId },
      );
      await announce(context, 'stores', before.store_id, before.client_id);
    }
    return noted(context, 'machine moved', machineId, { from: before?.bay, to: place.bay });
  });
}

function lockMachine(context: Context, machineId: string) {
  return row<{ state: string; store_id: string; client_id: string; bay: string }>(
    `select state, store_id, client_id, bay from machines
     where shop_id = $shopId and id = $machineId for update`,
    { shopId: context.shopId, machineId },
  );
}

async function refuseOpenCalls(context: Context, machineId: string): Promise<void> {
  const call = await row<{ number: number }>(
    `select number from calls where shop_id = $shopId and machine_id = $machineId
       and state in ('open', 'planned') limit 1`,
    { shopId: context.shopId, machineId },
  );
  if (call)
    throw problem('conflict', `Call ${call.number} is open for the machine: close it first.`);
}

async function update(
  context: Context,
  machineId: string,
  version: number,
  set: string,
  bind: Record<string, unknown>,
): Promise<void> {
  const key = { shopId: context.shopId, machineId };
  await orStale(
    await write(
      `update machines set ${set}
       where shop_id = $shopId and id = $machineId and version = $version returning id`,
      { ...bind, ...key, version },
    ),
    () => row('select 1 from machines where shop_id = $shopId and id = $machineId', key),
  );
}

async function noted(
  context: Context,
  what: string,
  machineId: string,
  details: Record<string, unknown> = {},
): Promise<Machine> {
  const machine = await showMachine(context, machineId);
  await record(context, what, { kind: 'machine', id: machineId }, details);
  await announce(context, 'machines', machineId, machine.client.id);
  return machine;
}
