import { type Context } from '../../core/context';
import { write } from '../../core/database/tenancy';

export interface BankToWrite {
  id: string;
  client_id: string;
  store_id: string;
  letter: string;
}

export interface MachineToWrite {
  id: string;
  is_new: boolean;
  client_id: string;
  store_id: string;
  bank_id: string;
  bay: string;
  bay_number: number;
  kind: string;
  energy: string;
  make: string;
  model: string;
  serial: string;
  built_on: string | null;
  installed_on: string | null;
  volts: number | null;
  amps: number | null;
  vend_price: number;
  cycles_a_day: number;
  supplier_warranty_until: string | null;
  note: string;
  /** For a machine that is new. */
  sticker_code: string;
}

/** Everything of the file in three statements, however many rows it has. */
export async function writeMachines(
  context: Context,
  banks: readonly BankToWrite[],
  machines: readonly MachineToWrite[],
): Promise<void> {
  const shopId = context.shopId;
  await write(
    `insert into banks (shop_id, id, client_id, store_id, letter)
     select $shopId, x.id, x.client_id, x.store_id, x.letter
     from jsonb_to_recordset($rows::jsonb) as x(id uuid, client_id uuid, store_id uuid, letter text)`,
    { shopId, rows: JSON.stringify(banks) },
  );
  const machineRows = `jsonb_to_recordset($rows::jsonb) as x(id uuid, client_id uuid, store_id uuid,
    bank_id uuid, bay text, bay_number integer, kind text, energy text, make text, model text,
    serial text, built_on date, installed_on date, volts integer, amps numeric, vend_price bigint,
    cycles_a_day numeric, supplier_warranty_until date, note text, sticker_code text)`;
  await write(
    `insert into machines (shop_id, id, client_id, store_id, bank_id, bay, bay_number, kind, energy,
       make, model, serial, built_on, installed_on, volts, amps, vend_price, cycles_a_day,
       supplier_warranty_until, note, sticker_code)
     select $shopId, x.id, x.client_id, x.store_id, x.bank_id, x.bay, x.bay_number, x.kind, x.energy,
       x.make, x.model, x.serial, x.built_on, x.installed_on, x.volts, x.amps, x.vend_price,
       x.cycles_a_day, x.supplier_warranty_until, x.note, x.sticker_code from ${machineRows}`,
    { shopId, rows: JSON.stringify(machines.filter((machine) => machine.is_new)) },
  );
  await write(
    `update machines m set kind = x.kind, energy = x.energy, make = x.make, model = x.model,
       serial = x.serial, built_on = x.built_on, installed_on = x.installed_on, volts = x.volts,
       amps = x.amps, vend_price = x.vend_price, cycles_a_day = x.cycles_a_day,
       supplier_warranty_until = x.supplier_warranty_until, note = x.note
     from ${machineRows} where m.shop_id = $shopId and m.id = x.id`,
    { shopId, rows: JSON.stringify(machines.filter((machine) => !machine.is_new)) },
  );
}
