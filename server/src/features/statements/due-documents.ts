import {
  type IsoDate,
  type StatedCharge,
  type StatedMoney,
  type StatedTicket,
  monthBounds,
} from '@lib/domain';
import { type StatedVisit } from '@lib/contracts';
import { type Context } from '../../core/context';
import { rows } from '../../core/database/tenancy';
import { type ShopFacts } from '../../core/shop-facts';
import { contractName, paymentName, ticketName } from './document-names';
import { statedVisits } from './stated-visits';

/** Everything of a store up to a day that stands on no statement yet. */
export interface DueDocuments {
  tickets: StatedTicket[];
  visits: StatedVisit[];
  fees: StatedCharge[];
  lateCharges: StatedCharge[];
  payments: StatedMoney[];
  refunds: StatedMoney[];
}

type Bind = { shopId: string; storeId: string; until: IsoDate };

/** True of a document that no statement holds; its alias is `x`. */
const notStated = (kind: string) => `not exists (
  select 1 from statement_documents d
  where d.shop_id = x.shop_id and d.document_kind = ${kind} and d.document_id = x.id)`;

/** Inside a tenant transaction that holds the store's row, so that nothing is gathered twice. */
export async function dueDocuments(
  context: Pick<Context, 'shopId'>,
  shop: ShopFacts,
  storeId: string,
  until: IsoDate,
): Promise<DueDocuments> {
  const bind = { shopId: context.shopId, storeId, until };
  const visits = await dueVisits(bind);
  const charges = await dueCharges(bind, shop);
  return {
    ...visits,
    ...charges,
    payments: await duePayments(bind),
    refunds: await dueRefunds(bind),
  };
}

interface TicketRow {
  id: string;
  visitId: string;
  number: number;
  date: IsoDate;
  list: number;
  net: number;
  tax: number;
  total: number;
  borneByShop: number;
}

async function dueVisits(bind: Bind): Promise<Pick<DueDocuments, 'tickets' | 'visits'>> {
  const tickets = await rows<TicketRow>(
    `select x.id, x.visit_id as "visitId", x.number, x.signed_off_on as date, x.list, x.net, x.tax,
       x.total, x.borne_by_shop as "borneByShop"
     from tickets x
     where x.shop_id = $shopId and x.store_id = $storeId and x.signed_off_on <= $until
       and ${notStated("'ticket'")}
     order by x.signed_off_on, x.number`,
    { ...bind },
  );
  if (tickets.length === 0) return { tickets: [], visits: [] };
  const visits = await statedVisits({ shopId: bind.shopId }, tickets);
  return {
    visits,
    tickets: tickets.map((ticket, index) => ({
      id: ticket.id,
      date: ticket.date,
      reference: ticketName(ticket.number),
      words: visits[index]?.words ?? '',
      machines: visits[index]?.jobs.map((job) => job.bay) ?? [],
      list: ticket.list,
      charged: ticket.net,
      tax: ticket.tax,
      total: ticket.total,
      borneByShop: ticket.borneByShop,
    })),
  };
}

interface FeeRow {
  id: string;
  kind: 'fee' | 'late_charge';
  month: string;
  words: string;
  number: number | null;
  net: number;
  tax: number;
}

async function dueCharges(
  bind: Bind,
  shop: ShopFacts,
): Promise<Pick<DueDocuments, 'fees' | 'lateCharges'>> {
  const found = await rows<FeeRow>(
    `select x.id, x.kind, x.month, x.words, c.number, x.net, x.tax
     from fees x left join contracts c on c.shop_id = x.shop_id and c.id = x.contract_id
     where x.shop_id = $shopId and x.store_id = $storeId and x.month <= left($until, 7)
       and ${notStated('x.kind')}
     order by x.month, x.id`,
    { ...bind },
  );
  const charges = (kind: FeeRow['kind']): StatedCharge[] =>
    found
      .filter((fee) => fee.kind === kind)
      .map((fee) => ({
        id: fee.id,
        date: monthBounds(fee.month, shop.zone).lastDay,
        reference: fee.number === null ? '' : contractName(fee.number),
        words: fee.words,
        charged: fee.net,
        tax: fee.tax,
      }));
  return { fees: charges('fee'), lateCharges: charges('late_charge') };
}

const methodWords: Record<string, string> = {
  card: 'Paid by card',
  transfer: 'Paid by transfer',
  cheque: 'Paid by cheque',
  cash: 'Paid in cash',
};

async function duePayments(bind: Bind): Promise<StatedMoney[]> {
  const found = await rows<{
    id: string;
    number: number;
    date: IsoDate;
    method: string;
    amount: number;
  }>(
    `select x.id, x.number, x.received_on as date, x.method, x.amount
     from payments x
     where x.shop_id = $shopId and x.store_id = $storeId and x.state = 'succeeded'
       and x.received_on <= $until and ${notStated("'payment'")}
     order by x.received_on, x.number`,
    { ...bind },
  );
  return found.map(({ id, number, date, method, amount }) => ({
    id,
    date,
    reference: paymentName(number),
    words: methodWords[method] ?? 'Paid',
    amount,
  }));
}

async function dueRefunds(bind: Bind): Promise<StatedMoney[]> {
  const found = await rows<{
    id: string;
    number: number;
    date: IsoDate;
    words: string;
    amount: number;
  }>(
    `select x.id, p.number, x.refunded_on as date, x.words, x.amount
     from refunds x join payments p on p.shop_id = x.shop_id and p.id = x.payment_id
     where x.shop_id = $shopId and x.store_id = $storeId
       and x.refunded_on <= $until and ${notStated("'refund'")}
     order by x.refunded_on, x.id`,
    { ...bind },
  );
  return found.map(({ id, number, date, words, amount }) => ({
    id,
    date,
    reference: paymentName(number),
    words: words || 'Given back',
    amount,
  }));
}
