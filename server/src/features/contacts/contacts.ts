import { v7 as uuid } from 'uuid';
import { record } from '../../core/audit';
import { type Context } from '../../core/context';
import { changes } from '../../core/database/changes';
import { type Bind, row, withTenant, write } from '../../core/database/tenancy';
import { instantOrNull } from '../../core/database/times';
import { type AnswerOf, type InputOf } from '../../core/http/route';
import { page, searched } from '../../core/lists/keyset';
import { shown } from '../../core/lists/shown';
import { announce } from '../../core/live/live';
import { found, invalid } from '../../core/problems/problem';
import { orStale } from '../../core/versions';
import { ownClient } from '../stores/own-store';

type Contact = AnswerOf<'contacts.create'>;

interface ContactRow extends Omit<Contact, 'client' | 'store' | 'endedAt'> {
  clientId: string;
  clientName: string;
  storeId: string | null;
  storeName: string | null;
  endedAt: Date | null;
}

const columns = `p.id, p.name, p.email, p.phone, p.gets_statements as "getsStatements",
  p.gets_visits as "getsVisits", p.ended_at as "endedAt", p.version, c.id as "clientId",
  c.name as "clientName", s.id as "storeId", s.name as "storeName"`;
const from = `contacts p join clients c on c.shop_id = p.shop_id and c.id = p.client_id
  left join stores s on s.shop_id = p.shop_id and s.id = p.store_id`;

export function listContacts(
  context: Context,
  query: InputOf<'contacts.list'>['query'],
): Promise<AnswerOf<'contacts.list'>> {
  return withTenant(context, async () => {
    const bind: Bind = { shopId: context.shopId };
    const where = [
      'p.shop_id = $shopId',
      ...ownClient(context, 'p.client_id', bind),
      ...shown(query.show, 'p.ended_at'),
      ...searched(query.q, ['p.name', 'p.email', 'p.phone', 's.name', 'c.name'], bind),
    ];
    if (query.clientId) {
      bind.clientId = query.clientId;
      where.push('p.client_id = $clientId');
    }
    if (query.storeId) {
      const store = found(
        await row<{ client_id: string }>(
          'select client_id from stores where shop_id = $shopId and id = $storeId',
          { ...bind, storeId: query.storeId },
        ),
      );
      bind.storeId = query.storeId;
      bind.storeClientId = store.client_id;
      where.push('p.client_id = $storeClientId', '(p.store_id = $storeId or p.store_id is null)');
    }
    return page<ContactRow, Contact>(
      {
        select: `select ${columns} from ${from}`,
        from,
        where,
        bind,
        sort: { column: 'p.name', type: 'text' },
        id: 'p.id',
        limit: query.limit,
        cursor: query.cursor,
      },
      present,
    );
  });
}

export function createContact(
  context: Context,
  body: InputOf<'contacts.create'>['body'],
): Promise<Contact> {
  return withTenant(context, async () => {
    await refuseForeignPlace(context, body.clientId, body.storeId ?? null);
    refuseMailWithoutAddress(body);
    const id = uuid();
    await write(
      `insert into contacts (shop_id, id, client_id, store_id, name, email, phone, gets_statements,
         gets_visits)
       values ($shopId, $id, $clientId, $storeId, $name, $email, $phone, $getsStatements,
         $getsVisits)`,
      {
        shopId: context.shopId,
        id,
        clientId: body.clientId,
        storeId: body.storeId ?? null,
        name: body.name,
        email: body.email ?? null,
        phone: body.phone ?? null,
        getsStatements: body.getsStatements ?? false,
        getsVisits: body.getsVisits ?? false,
      },
    );
    return noted(context, 'contact added', id);
  });
}

export function changeContact(
  context: Context,
  contactId: string,
  version: number,
  body: InputOf<'contacts.change'>['body'],
): Promise<Contact> {
  return withTenant(context, async () => {
    refuseMailWithoutAddress({ ...(await show(context, contactId)), ...body });
    const { set, bind } = changes(body, {
      name: 'name',
      email: 'email',
      phone: 'phone',
      getsStatements: 'gets_statements',
      getsVisits: 'gets_visits',
    });
    await update(context, contactId, version, set, bind);
    return noted(context, 'contact changed', contactId);
  });
}

export function endContact(context: Context, contactId: string, version: number): Promise<Contact> {
  return withTenant(context, async () => {
    await update(context, contactId, version, 'ended_at = coalesce(ended_at, $now)', {
      now: context.now,
    });
    return noted(context, 'contact ended', contactId);
  });
}

export function resumeContact(
  context: Context,
  contactId: string,
  version: number,
): Promise<Contact> {
  return withTenant(context, async () => {
    await update(context, contactId, version, 'ended_at = null', {});
    return noted(context, 'contact resumed', contactId);
  });
}

async function update(
  context: Context,
  contactId: string,
  version: number,
  set: string,
  bind: Bind,
): Promise<void> {
  const key = { shopId: context.shopId, contactId };
  await orStale(
    await write(
      `update contacts set ${set}
       where shop_id = $shopId and id = $contactId and version = $version returning id`,
      { ...bind, ...key, version },
    ),
    () => row('select 1 from contacts where shop_id = $shopId and id = $contactId', key),
  );
}

async function refuseForeignPlace(context: Context, clientId: string, storeId: string | null) {
  const client = await row('select 1 from clients where shop_id = $shopId and id = $clientId', {
    shopId: context.shopId,
    clientId,
  });
  if (!client) throw invalid([{ pointer: '/clientId', detail: 'is no client of the shop' }]);
  if (storeId === null) return;
  const store = await row(
    'select 1 from stores where shop_id = $shopId and id = $storeId and client_id = $clientId',
    { shopId: context.shopId, clientId, storeId },
  );
  if (!store) throw invalid([{ pointer: '/storeId', detail: 'is no store of the client' }]);
}

function refuseMailWithoutAddress(contact: {
  email?: string | null;
  getsStatements?: boolean;
  getsVisits?: boolean;
}): void {
  if (contact.email || !(contact.getsStatements || contact.getsVisits)) return;
  throw invalid([{ pointer: '/email', detail: 'is needed to send statements or word of visits' }]);
}

async function show(context: Context, contactId: string): Promise<Contact> {
  const contact = await row<ContactRow>(
    `select ${columns} from ${from} where p.shop_id = $shopId and p.id = $contactId`,
    { shopId: context.shopId, contactId },
  );
  return present(found(contact));
}

async function noted(context: Context, what: string, contactId: string): Promise<Contact> {
  const contact = await show(context, contactId);
  await record(context, what, { kind: 'contact', id: contactId });
  await announce(context, 'contacts', contactId, contact.client.id);
  return contact;
}

function present(row: ContactRow): Contact {
  const { storeId, storeName } = row;
  return {
    id: row.id,
    client: { id: row.clientId, name: row.clientName },
    store: storeId !== null && storeName !== null ? { id: storeId, name: storeName } : null,
    name: row.name,
    email: row.email,
    phone: row.phone,
    getsStatements: row.getsStatements,
    getsVisits: row.getsVisits,
    endedAt: instantOrNull(row.endedAt),
    version: row.version,
  };
}
