import { monthBounds, monthOf, previousMonth, ticketPostings } from '@lib/domain';
import { v7 as uuid } from 'uuid';
import { systemContext } from '../../server/src/core/context';
import { rows } from '../../server/src/core/database/tenancy';
import { postDocument } from '../../server/src/features/ledger/post';
import { firstBook } from '../../server/src/features/prices/first-book';
import { type TestServer } from './app';
import { buildLaundry, insert, inShop, next, type TestShop } from './factories';
import { workQueue } from './queue';

export const zone = 'America/New_York';

/** The month that is over and the one before it, as the shop of `buildShop` sees them. */
export function closedMonths(now = new Date()) {
  const last = previousMonth(monthOf(now, zone));
  return { last, before: previousMonth(last), lastDay: monthBounds(last, zone).lastDay };
}

export interface MoneyStore {
  clientId: string;
  storeId: string;
  machineIds: string[];
  contactId: string;
  email: string;
}

/** A laundry with somebody who gets its statements. */
export async function buildPayingStore(
  shop: TestShop,
  values: { email?: string } = {},
): Promise<MoneyStore> {
  const laundry = await buildLaundry(shop, 2);
  const email = values.email ?? `owner-${next()}@laundry.example`;
  const contactId = await insert(shop, 'contacts', {
    client_id: laundry.clientId,
    store_id: laundry.storeId,
    name: 'Ada Roe',
    email,
    gets_statements: true,
  });
  return { ...laundry, contactId, email };
}

export interface Charge {
  on: string;
  /** Without tax. */
  net: number;
  tax?: number;
  /** List value of a line that the shop bears. */
  borneByShop?: number;
}

/** A visit to one machine, signed off: what the store bears, and what the shop does. */
export async function buildSignedOff(
  shop: TestShop,
  store: MoneyStore,
  { on, net, tax = 0, borneByShop = 0 }: Charge,
): Promise<string> {
  const of = { client_id: store.clientId, store_id: store.storeId };
  const visitId = await insert(shop, 'visits', {
    ...of,
    number: next(),
    planned_on: on,
    state: 'completed',
  });
  const jobId = await insert(shop, 'jobs', {
    ...of,
    visit_id: visitId,
    machine_id: store.machineIds[0],
    position: 1,
    symptom: 'Fills slowly',
    finding: 'Inlet valve blocked',
    action: 'Fitted a new valve',
    result: 'put_right',
  });
  const ticketId = uuid();
  await insert(shop, 'tickets', {
    ...of,
    id: ticketId,
    visit_id: visitId,
    number: next(),
    signed_off_on: on,
    edition_id: await insert(shop, 'editions', {
      number: 10_000 + next(),
      valid_from: '2000-01-01',
      book: JSON.stringify(firstBook('USD')),
    }),
    currency: 'USD',
    list: net + borneByShop,
    net,
    tax,
    total: net + tax,
    borne_by_shop: borneByShop,
    own_cost: 0,
  });
  const line = (position: number, bearer: string, list: number, charged: number) =>
    insert(shop, 'ticket_lines', {
      client_id: store.clientId,
      ticket_id: ticketId,
      job_id: jobId,
      position,
      line_key: `line-${position}`,
      kind: bearer === 'store' ? 'labour' : 'part',
      description: bearer === 'store' ? 'Labour' : 'Door lock',
      quantity_milli: 1000,
      unit_price: list,
      bearer,
      list,
      charged,
      tax_basis_points: 0,
      tax: bearer === 'store' ? tax : 0,
      cost: 0,
    });
  await line(1, 'store', net, net);
  if (borneByShop) await line(2, 'shop', borneByShop, 0);
  await inShop(shop, () =>
    postDocument(systemContext(shop.id, new Date()), {
      kind: 'ticket',
      id: ticketId,
      clientId: store.clientId,
      postedOn: on,
      postings: ticketPostings({
        storeId: store.storeId,
        tax,
        lines: [{ kind: 'labour', charged: net, bearer: 'store', ownCost: 0 }],
      }),
    }),
  );
  await insertTicketOnVisit(shop, visitId, ticketId);
  return ticketId;
}

function insertTicketOnVisit(shop: TestShop, visitId: string, ticketId: string) {
  return inShop(shop, () =>
    rows('update visits set ticket_id = $ticketId where shop_id = $shopId and id = $visitId', {
      shopId: shop.id,
      visitId,
      ticketId,
    }),
  );
}

/** Works everything a month close needs, as the worker would, until nothing is left. */
export async function workClose(server: TestServer): Promise<void> {
  for (let worked = 1; worked > 0;) {
    worked =
      (await workQueue(server, 'statements-build')) +
      (await workQueue(server, 'statements-render')) +
      (await workQueue(server, 'deliveries-send'));
  }
}

/** What must hold of a shop's books whatever happened to it. */
export async function bookTroubles(shop: TestShop): Promise<string[]> {
  const checks: Record<string, string> = {
    'a document does not balance': `select document_id from entries where shop_id = $shopId
      group by document_kind, document_id having sum(amount) <> 0`,
    'statement numbers have gaps': `select 1 from statements where shop_id = $shopId
      having count(*) <> coalesce(max(number), 0)`,
    'payment numbers have gaps': `select 1 from payments
      where shop_id = $shopId and number is not null
      having count(*) <> coalesce(max(number), 0)`,
    'a statement does not foot': `select id from statements where shop_id = $shopId
      and closing <> opening + charged + tax - paid`,
    'an opening is not the last closing': `select id from (
        select id, opening, lag(closing, 1, 0::bigint) over (partition by store_id order by month)
          as before from statements where shop_id = $shopId) s
      where opening <> before`,
    'a stated document is not in the books': `select d.document_id from statement_documents d
      join tickets t on t.shop_id = d.shop_id and t.id = d.document_id and t.total <> 0
      where d.shop_id = $shopId and d.document_kind = 'ticket' and not exists (
        select 1 from entries e where e.shop_id = d.shop_id and e.document_kind = 'ticket'
          and e.document_id = d.document_id)`,
    'open items and the ledger disagree': `select s.id from stores s
      cross join lateral (select coalesce(sum(amount), 0) as balance from entries
        where shop_id = s.shop_id and store_id = s.id and account = 'receivable') b
      cross join lateral (select coalesce(sum(charged + tax), 0) as stated from statements
        where shop_id = s.shop_id and store_id = s.id) t
      cross join lateral (select coalesce(sum(amount), 0) as paid from payments
        where shop_id = s.shop_id and store_id = s.id and state = 'succeeded') p
      cross join lateral (select coalesce(sum(amount), 0) as back from refunds
        where shop_id = s.shop_id and store_id = s.id) r
      where s.shop_id = $shopId and b.balance <> t.stated - p.paid + r.back`,
    'a statement is paid more than it charges': `select s.id from statements s
      where s.shop_id = $shopId and s.charged + s.tax < (select coalesce(sum(amount), 0)
        from allocations a where a.shop_id = s.shop_id and a.statement_id = s.id)`,
  };
  return inShop(shop, async () => {
    const troubles: string[] = [];
    for (const [trouble, sql] of Object.entries(checks)) {
      if ((await rows(sql, { shopId: shop.id })).length) troubles.push(trouble);
    }
    return troubles;
  });
}
