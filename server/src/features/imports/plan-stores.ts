import { text as fields } from '@lib/contracts';
import { v7 as uuid } from 'uuid';
import { type Context } from '../../core/context';
import { rows } from '../../core/database/tenancy';
import { decimal, text } from './cells';
import { importedColumns } from './columns';
import { clientFinder, type KnownClient } from './find-client';
import {
  type CellChange,
  type CellError,
  changesOf,
  planned,
  type Planner,
  readCells,
} from './planned-row';
import { type TableRow } from './read-table';
import { type ContactToWrite, type StoreToWrite, writeStores } from './write-stores';

const columns = importedColumns('stores');
/** Those that tell which store is meant, or are of its contact. */
const notOfStore = [
  'clientNumber',
  'clientName',
  'number',
  'contactName',
  'contactEmail',
  'contactPhone',
];
const compared = columns.filter((column) => !notOfStore.includes(column.key));
const kinds = {
  clientNumber: text(fields.line(20)),
  clientName: text(fields.line(120)),
  number: text(fields.line(20)),
  name: text(fields.line(120)),
  address: text(fields.words(300)),
  hours: text(fields.words(200)),
  accessWords: text(fields.words(1000)),
  taxPlace: text(fields.line(80)),
  tripPlace: text(fields.line(80)),
  tripMetres: decimal(0, 2_000_000),
  contactName: text(fields.line(120)),
  contactEmail: text(fields.email),
  contactPhone: text(fields.phone),
};

interface StoreFields {
  name: string;
  address: string;
  hours: string;
  accessWords: string;
  taxPlace: string;
  tripPlace: string;
  tripMetres: number | null;
}

interface StoreCells extends StoreFields {
  clientNumber: string;
  clientName: string;
  number: string;
  contactName: string;
  contactEmail: string;
  contactPhone: string;
}

interface StandingStore extends StoreFields {
  id: string;
  number: string;
  clientId: string;
  endedAt: Date | null;
}

interface StandingContact {
  id: string;
  storeId: string;
  name: string;
  email: string;
  phone: string | null;
  getsStatements: boolean;
}

/** Stores with their client and the person who gets their statements. */
export async function storesPlanner(context: Context, table: TableRow[]): Promise<Planner> {
  const standing = await standingStores(context, table);
  const contacts = await standingContacts(context, [...standing.values()]);
  const clients = await clientFinder(context);
  const rowOfNumber = new Map<string, number>();
  const stores: StoreToWrite[] = [];
  const contactsToWrite: ContactToWrite[] = [];
  let newStores = 0;

  return {
    plan(row) {
      const errors: CellError[] = [];
      const cells = readCells<StoreCells>(row, kinds, columns, errors);
      const label = `${row.cells.number ?? ''} ${row.cells.name ?? ''}`;
      const first = cells.number === undefined ? undefined : rowOfNumber.get(cells.number);
      if (first !== undefined) {
        errors.push({ column: 'Store number', detail: `stands in row ${first} already` });
      }
      const store = standing.get(cells.number ?? '');
      if (store?.endedAt)
        errors.push({ column: 'Store number', detail: 'is of a store that ended' });
      const client = clients.find(row.row, cells, store?.clientId, errors);
      refuseHalfContact(cells, errors);
      if (errors.length || !client || cells.number === undefined) {
        return planned(row, label, { errors });
      }
      rowOfNumber.set(cells.number, row.row);
      const id = store?.id ?? uuid();
      const changes = store ? changesOf<StoreFields>(store, cells, kinds, compared) : [];
      if (!store || changes.length) stores.push(whole(id, client, store, cells, cells.number));
      changes.push(...planContact(cells, id, client, contacts.get(id) ?? [], contactsToWrite));
      if (!store) newStores++;
      return planned(row, label, { errors, changes, isNew: !store });
    },
    write: () => writeStores(context, clients.added(), stores, contactsToWrite),
    added: () => ({ stores: newStores, machines: 0 }),
  };
}

function whole(
  id: string,
  client: KnownClient,
  store: StandingStore | undefined,
  cells: Partial<StoreCells>,
  number: string,
): StoreToWrite {
  return {
    id,
    is_new: !store,
    client_id: client.id,
    number,
    name: cells.name ?? store?.name ?? '',
    address: cells.address ?? store?.address ?? '',
    hours: cells.hours ?? store?.hours ?? '',
    access_words: cells.accessWords ?? store?.accessWords ?? '',
    tax_place: cells.taxPlace ?? store?.taxPlace ?? '',
    trip_place: cells.tripPlace ?? store?.tripPlace ?? '',
    trip_metres: cells.tripMetres ?? store?.tripMetres ?? null,
  };
}

function refuseHalfContact(cells: Partial<StoreCells>, errors: CellError[]): void {
  if (cells.contactEmail === undefined && (cells.contactName ?? cells.contactPhone) !== undefined) {
    errors.push({ column: 'Statement e-mail', detail: 'is needed for a statement contact' });
  }
  if (cells.contactEmail !== undefined && cells.contactName === undefined) {
    errors.push({ column: 'Statement contact', detail: 'is needed: who is at this address?' });
  }
}

/** A contact is known by its address; one that stands begins to get statements. */
function planContact(
  cells: Partial<StoreCells>,
  storeId: string,
  client: KnownClient,
  standing: readonly StandingContact[],
  toWrite: ContactToWrite[],
): CellChange[] {
  const { contactEmail: email, contactName: name } = cells;
  if (email === undefined || name === undefined) return [];
  const known = standing.find((contact) => contact.email === email);
  const phone = cells.contactPhone ?? known?.phone ?? null;
  const changes: CellChange[] = [];
  if (!known?.getsStatements) changes.push({ column: 'Statement e-mail', from: '', to: email });
  if (known && known.name !== name) {
    changes.push({ column: 'Statement contact', from: known.name, to: name });
  }
  if (known && known.phone !== phone) {
    changes.push({ column: 'Statement telephone', from: known.phone ?? '', to: phone ?? '' });
  }
  if (changes.length) {
    toWrite.push({
      id: known?.id ?? uuid(),
      is_new: !known,
      client_id: client.id,
      store_id: storeId,
      name,
      email,
      phone,
    });
  }
  return changes;
}

async function standingStores(
  context: Context,
  table: TableRow[],
): Promise<Map<string, StandingStore>> {
  const found = await rows<StandingStore>(
    `select id, number, client_id as "clientId", name, address, hours,
       access_words as "accessWords", tax_place as "taxPlace", trip_place as "tripPlace",
       trip_metres as "tripMetres", ended_at as "endedAt"
     from stores where shop_id = $shopId and number = any($numbers::text[])`,
    { shopId: context.shopId, numbers: table.map((row) => row.cells.number ?? '') },
  );
  return new Map(found.map((store) => [store.number, store]));
}

async function standingContacts(
  context: Context,
  stores: readonly StandingStore[],
): Promise<Map<string, StandingContact[]>> {
  const found = await rows<StandingContact>(
    `select id, store_id as "storeId", name, email, phone, gets_statements as "getsStatements"
     from contacts where shop_id = $shopId and store_id = any($storeIds::uuid[])
       and email is not null and ended_at is null order by created_at, id`,
    { shopId: context.shopId, storeIds: stores.map((store) => store.id) },
  );
  const ofStore = new Map<string, StandingContact[]>();
  for (const contact of found) {
    ofStore.set(contact.storeId, [...(ofStore.get(contact.storeId) ?? []), contact]);
  }
  return ofStore;
}
