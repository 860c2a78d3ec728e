import { type Context } from '../../core/context';
import { write } from '../../core/database/tenancy';
import { freeNumber } from '../clients/free-number';
import { type KnownClient } from './find-client';

export interface StoreToWrite {
  id: string;
  is_new: boolean;
  client_id: string;
  number: string;
  name: string;
  address: string;
  hours: string;
  access_words: string;
  tax_place: string;
  trip_place: string;
  trip_metres: number | null;
}

export interface ContactToWrite {
  id: string;
  is_new: boolean;
  client_id: string;
  store_id: string;
  name: string;
  email: string;
  phone: string | null;
}

/** Everything of the file in a handful of statements, however many rows it has. */
export async function writeStores(
  context: Context,
  clients: readonly KnownClient[],
  stores: readonly StoreToWrite[],
  contacts: readonly ContactToWrite[],
): Promise<void> {
  const shopId = context.shopId;
  for (const client of clients) {
    const number = client.number ?? (await freeNumber(context, 'clients'));
    await write(
      'insert into clients (shop_id, id, name, number) values ($shopId, $id, $name, $number)',
      { shopId, id: client.id, name: client.name, number },
    );
  }
  const storeRows = `jsonb_to_recordset($rows::jsonb) as x(id uuid, client_id uuid, number text,
    name text, address text, hours text, access_words text, tax_place text, trip_place text,
    trip_metres integer)`;
  await write(
    `insert into stores (shop_id, id, client_id, number, name, address, hours, access_words,
       tax_place, trip_place, trip_metres)
     select $shopId, x.id, x.client_id, x.number, x.name, x.address, x.hours, x.access_words,
       x.tax_place, x.trip_place, x.trip_metres from ${storeRows}`,
    { shopId, rows: JSON.stringify(stores.filter((store) => store.is_new)) },
  );
  await write(
    `update stores s set name = x.name, address = x.address, hours = x.hours,
       access_words = x.access_words, tax_place = x.tax_place, trip_place = x.trip_place,
       trip_metres = x.trip_metres
     from ${storeRows} where s.shop_id = $shopId and s.id = x.id`,
    { shopId, rows: JSON.stringify(stores.filter((store) => !store.is_new)) },
  );
  const contactRows = `jsonb_to_recordset($rows::jsonb) as x(id uuid, client_id uuid, store_id uuid,
    name text, email text, phone text)`;
  await write(
    `insert into contacts (shop_id, id, client_id, store_id, name, email, phone, gets_statements)
     select $shopId, x.id, x.client_id, x.store_id, x.name, x.email, x.phone, true
     from ${contactRows}`,
    { shopId, rows: JSON.stringify(contacts.filter((contact) => contact.is_new)) },
  );
  await write(
    `update contacts p set name = x.name, phone = x.phone, gets_statements = true
     from ${contactRows} where p.shop_id = $shopId and p.id = x.id`,
    { shopId, rows: JSON.stringify(contacts.filter((contact) => !contact.is_new)) },
  );
}
