import { type AnswerOf } from '../../core/http/route';
import { type Context } from '../../core/context';
import { row, rows } from '../../core/database/tenancy';
import { found } from '../../core/problems/problem';
import { storeBalance } from '../receivables/open-statements';
import { statementName } from '../statements/document-names';

export type PaymentItem = AnswerOf<'payments.list'>['items'][number];
export type PaymentShown = AnswerOf<'payments.show'>;

export interface PaymentRow extends Omit<PaymentItem, 'createdAt'> {
  createdAt: Date;
}

export const paymentFrom = `payments p
  join stores s on s.shop_id = p.shop_id and s.id = p.store_id
  join clients c on c.shop_id = p.shop_id and c.id = p.client_id`;

export const paymentColumns = `p.id, p.number, p.client_id as "clientId", c.name as "clientName",
  p.store_id as "storeId", s.name as "storeName", p.method, p.state, p.amount, p.currency,
  p.received_on as "receivedOn", p.statement_id as "statementId", p.words, p.problem,
  (select coalesce(sum(r.amount), 0)::bigint from refunds r
   where r.shop_id = p.shop_id and r.payment_id = p.id) as refunded,
  p.created_at as "createdAt", p.version`;

export function presentPayment(payment: PaymentRow): PaymentItem {
  return {
    id: payment.id,
    number: payment.number,
    clientId: payment.clientId,
    clientName: payment.clientName,
    storeId: payment.storeId,
    storeName: payment.storeName,
    method: payment.method,
    state: payment.state,
    amount: payment.amount,
    currency: payment.currency,
    receivedOn: payment.receivedOn,
    statementId: payment.statementId,
    words: payment.words,
    problem: payment.problem,
    refunded: payment.refunded,
    createdAt: payment.createdAt.toISOString(),
    version: payment.version,
  };
}

/** A payment with what it settled. Inside a tenant transaction. */
export async function readPayment(context: Context, paymentId: string): Promise<PaymentShown> {
  const bind = { shopId: context.shopId, paymentId };
  const payment = found(
    await row<PaymentRow>(
      `select ${paymentColumns} from ${paymentFrom}
       where p.shop_id = $shopId and p.id = $paymentId`,
      bind,
    ),
  );
  const settled = await rows<{
    statementId: string;
    number: number;
    month: string;
    amount: number;
  }>(
    `select s.id as "statementId", s.number, s.month, sum(a.amount)::bigint as amount
     from allocations a join statements s on s.shop_id = a.shop_id and s.id = a.statement_id
     where a.shop_id = $shopId and a.payment_id = $paymentId
     group by s.id, s.number, s.month having sum(a.amount) <> 0 order by s.month, s.number`,
    bind,
  );
  const refunds = await rows<{ id: string; on: string; amount: number; words: string }>(
    `select id, refunded_on as "on", amount, words from refunds
     where shop_id = $shopId and payment_id = $paymentId order by refunded_on, id`,
    bind,
  );
  const used = settled.reduce((sum, part) => sum + part.amount, 0);
  const there = payment.state === 'succeeded' ? payment.amount - payment.refunded : 0;
  return {
    ...presentPayment(payment),
    allocations: settled.map(({ number, ...part }) => ({
      statementId: part.statementId,
      statementName: statementName(number),
      month: part.month,
      amount: part.amount,
    })),
    credit: there - used,
    balance: await storeBalance(context, payment.storeId),
    refunds,
  };
}
