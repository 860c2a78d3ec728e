import { energy, machineKind, text as fields } from '@lib/contracts';
import { type Energy, type MachineKind } from '@lib/domain';
import { v7 as uuid } from 'uuid';
import { type Context } from '../../core/context';
import { rows } from '../../core/database/tenancy';
import { shopFacts } from '../../core/shop-facts';
import { bayName } from '../machines/bay';
import { stickerCode } from '../machines/sticker-code';
import { CellRefused, type CellKind, choice, dayCell, decimal, money, text } from './cells';
import { importedColumns } from './columns';
import { type CellError, changesOf, planned, type Planner, readCells } from './planned-row';
import { type TableRow } from './read-table';
import { type BankToWrite, type MachineToWrite, writeMachines } from './write-machines';

const columns = importedColumns('machines');
const compared = columns.filter(({ key }) => key !== 'storeNumber' && key !== 'bay');

interface Bay {
  letter: string;
  number: number;
}

const bayCell: CellKind<Bay> = {
  read(cell) {
    const found = /^([A-Za-z]{1,2})[ -]?(\d{1,3})$/.exec(cell);
    const number = Number(found?.[2] ?? 0);
    if (!found?.[1] || number < 1) throw new CellRefused('is not a bay written like B-07');
    return { letter: found[1].toUpperCase(), number };
  },
  show: (bay) => bayName(bay.letter, bay.number),
};

interface MachineFields {
  kind: MachineKind;
  energy: Energy;
  make: string;
  model: string;
  serial: string;
  builtOn: string | null;
  installedOn: string | null;
  volts: number | null;
  amps: number | null;
  vendPrice: number;
  cyclesADay: number;
  supplierWarrantyUntil: string | null;
  note: string;
}

interface MachineCells extends MachineFields {
  storeNumber: string;
  bay: Bay;
}

interface StandingMachine extends MachineFields {
  id: string;
  storeId: string;
  bay: string;
}

interface StandingStore {
  id: string;
  clientId: string;
  number: string;
  endedAt: Date | null;
}

function cellKinds(currency: string) {
  return {
    storeNumber: text(fields.line(20)),
    bay: bayCell,
    kind: choice(machineKind.options),
    energy: choice(energy.options),
    make: text(fields.line(60)),
    model: text(fields.line(60)),
    serial: text(fields.line(60)),
    builtOn: dayCell,
    installedOn: dayCell,
    volts: decimal(0, 1000),
    amps: decimal(2, 1000),
    vendPrice: money(currency),
    cyclesADay: decimal(1, 1000),
    supplierWarrantyUntil: dayCell,
    note: text(fields.words(2000)),
  };
}

/** Machines in the bays of stores that stand; a bank that is not there yet comes with them. */
export async function machinesPlanner(context: Context, table: TableRow[]): Promise<Planner> {
  const kinds = cellKinds((await shopFacts(context)).currency);
  const stores = await standingStores(context, table);
  const storeIds = [...stores.values()].map((store) => store.id);
  const machines = await standingMachines(context, storeIds);
  const banks = await standingBanks(context, storeIds);
  const bySerial = await bearersOfSerials(context, table);
  const rowOfBay = new Map<string, number>();
  const rowOfSerial = new Map<string, number>();
  const newBanks: BankToWrite[] = [];
  const toWrite: MachineToWrite[] = [];
  let newMachines = 0;

  function refuseSerialElsewhere(
    row: TableRow,
    cells: Partial<MachineCells>,
    standing: StandingMachine | undefined,
    errors: CellError[],
  ): void {
    if (cells.serial === undefined) return;
    const column = 'Serial number';
    if (standing && standing.serial !== '' && standing.serial !== cells.serial) {
      const detail = `is not that of the machine in ${standing.bay} (${standing.serial}): retire or move that one first`;
      errors.push({ column, detail });
    }
    const make = cells.make ?? standing?.make ?? '';
    const key = `${make.toLowerCase()}\n${cells.serial}`;
    const bearer = bySerial.get(key);
    if (bearer && bearer.id !== standing?.id) {
      errors.push({
        column,
        detail: `stands in ${bearer.bay} of store ${bearer.storeNumber} already`,
      });
    }
    const first = rowOfSerial.get(key);
    if (first !== undefined) errors.push({ column, detail: `stands in row ${first} already` });
    else rowOfSerial.set(key, row.row);
  }

  return {
    plan(row) {
      const errors: CellError[] = [];
      const cells = readCells<MachineCells>(row, kinds, columns, errors);
      const label = `${row.cells.storeNumber ?? ''} ${row.cells.bay ?? ''} ${row.cells.make ?? ''} ${row.cells.model ?? ''}`;
      const store = stores.get(cells.storeNumber ?? '');
      if (cells.storeNumber !== undefined && !store) {
        errors.push({ column: 'Store number', detail: 'is of no store: import the stores first' });
      } else if (store?.endedAt) {
        errors.push({ column: 'Store number', detail: 'is of a store that ended' });
      }
      if (!store || !cells.bay || !cells.kind) return planned(row, label, { errors });
      const bay = bayName(cells.bay.letter, cells.bay.number);
      const place = `${store.id} ${bay}`;
      const first = rowOfBay.get(place);
      if (first !== undefined) {
        errors.push({ column: 'Bay', detail: `of this store stands in row ${first} already` });
      }
      rowOfBay.set(place, row.row);
      const standing = machines.get(place);
      refuseSerialElsewhere(row, cells, standing, errors);
      if (errors.length) return planned(row, label, { errors });

      const changes = standing ? changesOf<MachineFields>(standing, cells, kinds, compared) : [];
      if (!standing || changes.length) {
        const bankKey = `${store.id} ${cells.bay.letter}`;
        const bank = banks.get(bankKey) ?? {
          id: uuid(),
          client_id: store.clientId,
          store_id: store.id,
          letter: cells.bay.letter,
        };
        if (!banks.has(bankKey)) {
          banks.set(bankKey, bank);
          newBanks.push(bank);
        }
        toWrite.push(
          whole(store, bank.id, { ...cells.bay, name: bay }, cells.kind, standing, cells),
        );
      }
      if (!standing) newMachines++;
      return planned(row, label, { errors, changes, isNew: !standing });
    },
    write: () => writeMachines(context, newBanks, toWrite),
    added: () => ({ stores: 0, machines: newMachines }),
  };
}

function whole(
  store: StandingStore,
  bankId: string,
  bay: Bay & { name: string },
  kind: MachineKind,
  standing: StandingMachine | undefined,
  cells: Partial<MachineCells>,
): MachineToWrite {
  return {
    id: standing?.id ?? uuid(),
    is_new: !standing,
    client_id: store.clientId,
    store_id: store.id,
    bank_id: bankId,
    bay: bay.name,
    bay_number: bay.number,
    kind,
    energy: cells.energy ?? standing?.energy ?? 'electric',
    make: cells.make ?? standing?.make ?? '',
    model: cells.model ?? standing?.model ?? '',
    serial: cells.serial ?? standing?.serial ?? '',
    built_on: cells.builtOn ?? standing?.builtOn ?? null,
    installed_on: cells.installedOn ?? standing?.installedOn ?? null,
    volts: cells.volts ?? standing?.volts ?? null,
    amps: cells.amps ?? standing?.amps ?? null,
    vend_price: cells.vendPrice ?? standing?.vendPrice ?? 0,
    cycles_a_day: cells.cyclesADay ?? standing?.cyclesADay ?? 0,
    supplier_warranty_until: cells.supplierWarrantyUntil ?? standing?.supplierWarrantyUntil ?? null,
    note: cells.note ?? standing?.note ?? '',
    sticker_code: stickerCode(),
  };
}

async function standingStores(
  context: Context,
  table: TableRow[],
): Promise<Map<string, StandingStore>> {
  const numbers = [...new Set(table.map((row) => row.cells.storeNumber ?? ''))];
  const found = await rows<StandingStore>(
    `select id, client_id as "clientId", number, ended_at as "endedAt" from stores
     where shop_id = $shopId and number = any($numbers::text[])`,
    { shopId: context.shopId, numbers },
  );
  return new Map(found.map((store) => [store.number, store]));
}

async function standingMachines(
  context: Context,
  storeIds: string[],
): Promise<Map<string, StandingMachine>> {
  const found = await rows<StandingMachine & { amps: string | null; cyclesADay: string }>(
    `select id, store_id as "storeId", bay, kind, energy, make, model, serial,
       built_on as "builtOn", installed_on as "installedOn", volts, amps,
       vend_price as "vendPrice", cycles_a_day as "cyclesADay",
       supplier_warranty_until as "supplierWarrantyUntil", note
     from machines where shop_id = $shopId and store_id = any($storeIds::uuid[])
       and state <> 'retired'`,
    { shopId: context.shopId, storeIds },
  );
  return new Map(
    found.map((machine) => [
      `${machine.storeId} ${machine.bay}`,
      {
        ...machine,
        amps: machine.amps === null ? null : Number(machine.amps),
        cyclesADay: Number(machine.cyclesADay),
      },
    ]),
  );
}

async function standingBanks(
  context: Context,
  storeIds: string[],
): Promise<Map<string, BankToWrite>> {
  const found = await rows<BankToWrite>(
    `select id, client_id, store_id, letter from banks
     where shop_id = $shopId and store_id = any($storeIds::uuid[])`,
    { shopId: context.shopId, storeIds },
  );
  return new Map(found.map((bank) => [`${bank.store_id} ${bank.letter}`, bank]));
}

/** Which machine of the shop bears a serial number of the file, by make and number. */
async function bearersOfSerials(context: Context, table: TableRow[]) {
  const serials = [...new Set(table.map((row) => row.cells.serial ?? ''))].filter(Boolean);
  const found = await rows<{
    id: string;
    make: string;
    serial: string;
    bay: string;
    storeNumber: string;
  }>(
    `select m.id, m.make, m.serial, m.bay, s.number as "storeNumber" from machines m
     join stores s on s.shop_id = m.shop_id and s.id = m.store_id
     where m.shop_id = $shopId and m.serial = any($serials::text[]) and m.state <> 'retired'`,
    { shopId: context.shopId, serials },
  );
  return new Map(found.map((m) => [`${m.make.toLowerCase()}\n${m.serial}`, m]));
}
