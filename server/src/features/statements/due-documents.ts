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

type Bind = { shopId: string; storeIds: readonly string[]; until: IsoDate };
/** A document with the store it is for, which the statement need not say again. */
type OfStore<Document> = { storeId: string; document: Document };

/** True of a document that no statement holds; its alias is `x`. */
const notStated = (kind: string) => `not exists (
  select 1 from statement_documents d
  where d.shop_id = x.shop_id and d.document_kind = ${kind} and d.document_id = x.id)`;

/**
 * What is due of each of some stores. Inside a tenant transaction that holds the stores' rows, so
 * that nothing is gathered twice.
 */
export async function dueDocuments(
  context: Pick<Context, 'shopId'>,
  shop: ShopFacts,
  storeIds: readonly string[],
  until: IsoDate,
): Promise<(storeId: string) => DueDocuments> {
  const bind = { shopId: context.shopId, storeIds, until };
  const tickets = await dueTickets(bind);
  const charges = await dueCharges(bind, shop);
  const payments = await duePayments(bind);
  const refunds = await dueRefunds(bind);
  return (storeId) => {
    const visited = of(storeId, tickets);
    const charged = of(storeId, charges);
    return {
      tickets: visited.map(({ ticket }) => ticket),
      visits: visited.map(({ visit }) => visit),
      fees: charged.filter(({ kind }) => kind === 'fee').map(({ charge }) => charge),
      lateCharges: charged.filter(({ kind }) => kind === 'late_charge').map(({ charge }) => charge),
      payments: of(storeId, payments),
      refunds: of(storeId, refunds),
    };
  };
}

function of<Document>(storeId: string, documents: readonly OfStore<Document>[]): Document[] {
  return documents.filter((each) => each.storeId === storeId).map(({ document }) => document);
}

interface TicketRow {
  id: string;
  storeId: string;
  visitId: string;
  number: number;
  date: IsoDate;
  list: number;
  net: number;
  tax: number;
  total: number;
  borneByShop: number;
}

async function dueTickets(
  bind: Bind,
): Promise<OfStore<{ ticket: StatedTicket; visit: StatedVisit }>[]> {
  const tickets = await rows<TicketRow>(
    `select x.id, x.store_id as "storeId", x.visit_id as "visitId", x.number,
       x.signed_off_on as date, x.list, x.net, x.tax, x.total, x.borne_by_shop as "borneByShop"
     from tickets x
     where x.shop_id = $shopId and x.store_id = any ($storeIds::uuid[])
       and x.signed_off_on <= $until and ${notStated("'ticket'")}
     order by x.signed_off_on, x.number`,
    { ...bind },
  );
  if (tickets.length === 0) return [];
  const visits = await statedVisits({ shopId: bind.shopId }, tickets);
  return visits.map((visit, index) => {
    const { storeId, visitId: _, number, net: charged, ...ticket } = tickets[index] as TicketRow;
    const reference = ticketName(number);
    const machines = visit.jobs.map((job) => job.bay);
    return {
      storeId,
      document: {
        visit,
        ticket: { ...ticket, charged, reference, words: visit.words, machines },
      },
    };
  });
}

interface FeeRow {
  id: string;
  storeId: string;
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
): Promise<OfStore<{ kind: FeeRow['kind']; charge: StatedCharge }>[]> {
  const found = await rows<FeeRow>(
    `select x.id, x.store_id as "storeId", x.kind, x.month, x.words, c.number, x.net, x.tax
     from fees x left join contracts c on c.shop_id = x.shop_id and c.id = x.contract_id
     where x.shop_id = $shopId and x.store_id = any ($storeIds::uuid[])
       and x.month <= left($until, 7) and ${notStated('x.kind')}
     order by x.month, x.id`,
    { ...bind },
  );
  return found.map(({ storeId, kind, month, number, id, words, net: charged, tax }) => {
    const date = monthBounds(month, shop.zone).lastDay;
    const reference = number === null ? '' : contractName(number);
    return { storeId, document: { kind, charge: { id, date, reference, words, charged, tax } } };
  });
}

const methodWords: Record<string, string> = {
  card: 'Paid by card',
  transfer: 'Paid by transfer',
  cheque: 'Paid by cheque',
  cash: 'Paid in cash',
};

interface MoneyRow {
  id: string;
  storeId: string;
  number: number;
  date: IsoDate;
  amount: number;
}

async function duePayments(bind: Bind): Promise<OfStore<StatedMoney>[]> {
  const found = await rows<MoneyRow & { method: string }>(
    `select x.id, x.store_id as "storeId", x.number, x.received_on as date, x.method, x.amount
     from payments x
     where x.shop_id = $shopId and x.store_id = any ($storeIds::uuid[]) and x.state = 'succeeded'
       and x.received_on <= $until and ${notStated("'payment'")}
     order by x.received_on, x.number`,
    { ...bind },
  );
  return found.map(({ method, ...payment }) => stated(payment, methodWords[method] ?? 'Paid'));
}

async function dueRefunds(bind: Bind): Promise<OfStore<StatedMoney>[]> {
  const found = await rows<MoneyRow & { words: string }>(
    `select x.id, x.store_id as "storeId", p.number, x.refunded_on as date, x.words, x.amount
     from refunds x join payments p on p.shop_id = x.shop_id and p.id = x.payment_id
     where x.shop_id = $shopId and x.store_id = any ($storeIds::uuid[])
       and x.refunded_on <= $until and ${notStated("'refund'")}
     order by x.refunded_on, x.id`,
    { ...bind },
  );
  return found.map(({ words, ...refund }) => stated(refund, words || 'Given back'));
}

function stated(
  { storeId, number, id, date, amount }: MoneyRow,
  words: string,
): OfStore<StatedMoney> {
  return { storeId, document: { id, date, reference: paymentName(number), words, amount } };
}
