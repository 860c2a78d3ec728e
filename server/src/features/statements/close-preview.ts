import { type Month, monthBounds, statementDueAt } from '@lib/domain';
import { type RunState } from '@lib/contracts';
import { type Context } from '../../core/context';
import { row, rows, withTenant } from '../../core/database/tenancy';
import { type AnswerOf } from '../../core/http/route';
import { type ShopFacts, shopFacts } from '../../core/shop-facts';
import { recipientsOfStore } from '../deliveries/queue-statement-mails';
import { lastDueMonth, obstacleToClose } from './close-month';
import { feesDue, monthsToState } from './fees-due';
import { unfinishedWork } from './unfinished-work';

type Preview = AnswerOf<'statements.closePreview'>;
type PreviewStore = Preview['stores'][number];

/** Charges from this multiple of last month on are worth a look before they are sent. */
const unusualFrom = 3;

/** What closing a month would say of each store, from what stands on no statement yet. */
export function previewClose(context: Context, asked: Month | undefined): Promise<Preview> {
  return withTenant(context, async () => {
    const shop = await shopFacts(context);
    const month = asked ?? lastDueMonth(context.now, shop);
    const { lastDay } = monthBounds(month, shop.zone);
    const bind = { shopId: context.shopId, month, lastDay };
    const run = await row<{ id: string; state: RunState }>(
      `select id, state from statement_runs
       where shop_id = $shopId and month = $month order by revision desc limit 1`,
      bind,
    );
    const stores = await previewStores(context, shop, bind);
    return {
      month,
      currency: shop.currency,
      dueAt: shop.closeBySchedule
        ? statementDueAt(month, shop.statementDay, shop.statementHour, shop.zone)
        : null,
      mayClose: (await obstacleToClose(context, shop, month)) === undefined,
      run: run ?? null,
      stores,
      totals: totalsOf(stores),
      unfinished: await unfinishedWork(context, lastDay, stores),
    };
  });
}

interface Bind extends Record<string, string> {
  shopId: string;
  month: Month;
  lastDay: string;
}

type Charges = Pick<PreviewStore, 'visits' | 'charged' | 'tax' | 'borneByShop' | 'paid'>;
const none: Charges = { visits: 0, charged: 0, tax: 0, borneByShop: 0, paid: 0 };

interface StoreRow {
  storeId: string;
  storeName: string;
  clientId: string;
  clientName: string;
  recipients: number;
  last: LastRow | null;
  stated: StatedRow | null;
}

interface LastRow {
  visits: number;
  charged: number;
  tax: number;
  closing: number;
}

interface StatedRow extends LastRow {
  id: string;
  opening: number;
  borneByShop: number;
  paid: number;
}

async function previewStores(
  context: Context,
  shop: ShopFacts,
  bind: Bind,
): Promise<PreviewStore[]> {
  const stores = await storeRows(bind);
  const open = stores.filter((store) => !store.stated).map((store) => store.storeId);
  const due = await dueByStore(bind);
  const months = await monthsToState(context, bind.month);
  for (const fee of await feesDue(context, shop, months, open)) {
    const before = due.get(fee.storeId) ?? none;
    due.set(fee.storeId, {
      ...before,
      charged: before.charged + fee.net,
      tax: before.tax + fee.tax,
    });
  }
  return stores.map((store) => previewOf(store, due.get(store.storeId) ?? none));
}

function previewOf(store: StoreRow, due: Charges): PreviewStore {
  const { stated, last } = store;
  const charges: Charges = stated ?? due;
  const opening = stated ? stated.opening : (last?.closing ?? 0);
  const { visits, charged, tax, borneByShop, paid } = charges;
  const before = last ? last.charged + last.tax : 0;
  return {
    storeId: store.storeId,
    storeName: store.storeName,
    clientId: store.clientId,
    clientName: store.clientName,
    visits,
    opening,
    charged,
    tax,
    borneByShop,
    paid,
    closing: opening + charged + tax - paid,
    lastMonth: last && {
      visits: last.visits,
      charged: last.charged,
      tax: last.tax,
      closing: last.closing,
    },
    unusual: before > 0 && charged + tax >= unusualFrom * before,
    recipients: store.recipients,
    statementId: stated?.id ?? null,
  };
}

const visitsOf = (alias: string) => `(select count(*)::int from statement_documents d
  where d.shop_id = ${alias}.shop_id and d.statement_id = ${alias}.id and d.document_kind = 'ticket')`;

/** Stores the close would take in, each with its statement of the month and the one before. */
function storeRows(bind: Bind): Promise<StoreRow[]> {
  return rows<StoreRow>(
    `select s.id as "storeId", s.name as "storeName", s.client_id as "clientId",
       c.name as "clientName",
       (select count(*)::int from (${recipientsOfStore}) r) as recipients,
       (select jsonb_build_object('visits', ${visitsOf('p')}, 'charged', p.charged, 'tax', p.tax,
          'closing', p.closing)
        from statements p where p.shop_id = s.shop_id and p.store_id = s.id and p.month < $month
        order by p.month desc limit 1) as last,
       (select jsonb_build_object('id', p.id, 'visits', ${visitsOf('p')}, 'opening', p.opening,
          'charged', p.charged, 'tax', p.tax, 'borneByShop', p.borne_by_shop, 'paid', p.paid,
          'closing', p.closing)
        from statements p where p.shop_id = s.shop_id and p.store_id = s.id and p.month = $month
        order by p.revision desc limit 1) as stated
     from stores s join clients c on c.shop_id = s.shop_id and c.id = s.client_id
     where s.shop_id = $shopId and (s.ended_at is null or exists (
       select 1 from entries e
       where e.shop_id = s.shop_id and e.store_id = s.id and e.account in ('unbilled', 'receivable')
       group by e.account having sum(e.amount) <> 0))
     order by s.name, s.id`,
    { shopId: bind.shopId, month: bind.month },
  );
}

const notStated = (kind: string) => `not exists (select 1 from statement_documents d
  where d.shop_id = x.shop_id and d.document_kind = ${kind} and d.document_id = x.id)`;

/** Sums of what stands on no statement yet, by store. */
async function dueByStore(bind: Bind): Promise<Map<string, Charges>> {
  const sums = await rows<Charges & { storeId: string }>(
    `select store_id as "storeId", sum(visits)::int as visits, sum(charged)::bigint as charged,
       sum(tax)::bigint as tax, sum(borne)::bigint as "borneByShop", sum(paid)::bigint as paid
     from (
       select x.store_id, 1 as visits, x.net as charged, x.tax, x.borne_by_shop as borne, 0 as paid
       from tickets x
       where x.shop_id = $shopId and x.signed_off_on <= $lastDay and ${notStated("'ticket'")}
       union all
       select x.store_id, 0, x.net, x.tax, 0, 0 from fees x
       where x.shop_id = $shopId and x.month <= $month and ${notStated('x.kind')}
       union all
       select x.store_id, 0, 0, 0, 0, x.amount from payments x
       where x.shop_id = $shopId and x.state = 'succeeded' and x.received_on <= $lastDay
         and ${notStated("'payment'")}
       union all
       select x.store_id, 0, 0, 0, 0, -x.amount from refunds x
       where x.shop_id = $shopId and x.refunded_on <= $lastDay and ${notStated("'refund'")}
     ) due group by store_id`,
    { shopId: bind.shopId, month: bind.month, lastDay: bind.lastDay },
  );
  return new Map(sums.map(({ storeId, ...charges }) => [storeId, charges]));
}

function totalsOf(stores: readonly PreviewStore[]): Preview['totals'] {
  const sum = (field: Exclude<keyof Preview['totals'], 'stores'>) =>
    stores.reduce((total, store) => total + store[field], 0);
  return {
    stores: stores.length,
    visits: sum('visits'),
    opening: sum('opening'),
    charged: sum('charged'),
    tax: sum('tax'),
    borneByShop: sum('borneByShop'),
    paid: sum('paid'),
    closing: sum('closing'),
  };
}
