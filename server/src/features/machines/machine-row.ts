import { takingsADay } from '@lib/domain';
import { type Context } from '../../core/context';
import { type AnswerOf } from '../../core/http/route';

type Summary = AnswerOf<'machines.list'>['items'][number];
type Machine = AnswerOf<'machines.show'>;

export interface MachineRow extends Omit<
  Machine,
  | 'store'
  | 'client'
  | 'bank'
  | 'stateSince'
  | 'takingsADay'
  | 'conditions'
  | 'jobs'
  | 'amps'
  | 'cyclesADay'
> {
  storeId: string;
  storeName: string;
  clientId: string;
  clientName: string;
  bankId: string;
  letter: string;
  stateSince: Date;
  /** Exact decimals come as text. */
  amps: string | null;
  cyclesADay: string;
}

export const machineSummaryFrom = `machines m
  join stores s on s.shop_id = m.shop_id and s.id = m.store_id`;
export const machineSummaryColumns = `m.id, m.bay, m.kind, m.energy, m.make, m.model, m.serial,
  m.state, m.state_since as "stateSince", m.vend_price as "vendPrice",
  m.cycles_a_day as "cyclesADay", m.version, s.id as "storeId", s.name as "storeName"`;

export const machineFrom = `${machineSummaryFrom}
  join clients c on c.shop_id = m.shop_id and c.id = m.client_id
  join banks b on b.shop_id = m.shop_id and b.id = m.bank_id`;
export const machineColumns = `${machineSummaryColumns}, m.bay_number as "bayNumber",
  m.built_on as "builtOn", m.installed_on as "installedOn", m.volts, m.amps,
  m.supplier_warranty_until as "supplierWarrantyUntil", m.sticker_code as "stickerCode", m.note,
  c.id as "clientId", c.name as "clientName", b.id as "bankId", b.letter`;

type SummaryRow = Pick<
  MachineRow,
  | 'storeId'
  | 'storeName'
  | 'stateSince'
  | 'vendPrice'
  | 'cyclesADay'
  | Exclude<keyof Summary, 'store' | 'stateSince' | 'takingsADay'>
>;

export function presentMachineSummary(context: Context, row: SummaryRow): Summary {
  const seesMoney = context.role !== 'attendant';
  return {
    id: row.id,
    store: { id: row.storeId, name: row.storeName },
    bay: row.bay,
    kind: row.kind,
    energy: row.energy,
    make: row.make,
    model: row.model,
    serial: row.serial,
    state: row.state,
    stateSince: row.stateSince.toISOString(),
    takingsADay: seesMoney ? takingsADay(row.vendPrice, Number(row.cyclesADay)) : null,
    version: row.version,
  };
}

export function presentMachine(
  context: Context,
  row: MachineRow,
  more: Pick<Machine, 'conditions' | 'jobs'>,
): Machine {
  return {
    ...presentMachineSummary(context, row),
    client: { id: row.clientId, name: row.clientName },
    bank: { id: row.bankId, letter: row.letter },
    bayNumber: row.bayNumber,
    builtOn: row.builtOn,
    installedOn: row.installedOn,
    volts: row.volts,
    amps: row.amps === null ? null : Number(row.amps),
    vendPrice: row.vendPrice,
    cyclesADay: Number(row.cyclesADay),
    supplierWarrantyUntil: row.supplierWarrantyUntil,
    stickerCode: row.stickerCode,
    note: context.clientId === null ? row.note : null,
    ...more,
  };
}
