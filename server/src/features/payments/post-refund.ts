import { type PaymentMethod, refundPostings } from '@lib/domain';
import { v7 as uuid } from 'uuid';
import { type Context } from '../../core/context';
import { row, rows, write } from '../../core/database/tenancy';
import { announce } from '../../core/live/live';
import { postDocument } from '../ledger/post';
import { allocate } from '../receivables/apply-credits';
import { lockStore } from './post-payment';

export interface GivenBack {
  paymentId: string;
  storeId: string;
  amount: number;
  refundedOn: string;
  words: string;
  /** The refund's or dispute's id at the card payment service. */
  cardRefund: string;
}

/**
 * Posts money that went back to the payer, once. What it had settled is owed again: first the unused
 * part of the payment is taken back, then what it settled last.
 */
export async function postRefund(
  context: Pick<Context, 'shopId'>,
  refund: GivenBack,
): Promise<boolean> {
  const { clientId } = await lockStore(context, refund.storeId);
  const payment = await row<{ method: PaymentMethod; left: number; unused: number }>(
    `select p.method, p.amount - r.back as left, p.amount - r.back - a.used as unused
     from payments p
     cross join lateral (select coalesce(sum(amount), 0)::bigint as back from refunds
       where shop_id = p.shop_id and payment_id = p.id) r
     cross join lateral (select coalesce(sum(amount), 0)::bigint as used from allocations
       where shop_id = p.shop_id and payment_id = p.id) a
     where p.shop_id = $shopId and p.id = $paymentId and p.state = 'succeeded'`,
    { shopId: context.shopId, paymentId: refund.paymentId },
  );
  if (!payment) return false;
  // More cannot go back than came; a dispute of a payment already given back takes nothing more.
  const amount = Math.min(refund.amount, payment.left);
  if (amount <= 0) return false;
  const id = uuid();
  const made = await write<{ id: string }>(
    `insert into refunds (shop_id, id, client_id, store_id, payment_id, amount, refunded_on, words, card_refund)
     values ($shopId, $id, $clientId, $storeId, $paymentId, $amount, $refundedOn, $words, $cardRefund)
     on conflict (shop_id, card_refund) do nothing returning id`,
    { ...refund, shopId: context.shopId, id, clientId, amount },
  );
  if (made.length === 0) return false;
  await postDocument(context, {
    kind: 'refund',
    id,
    clientId,
    postedOn: refund.refundedOn,
    postings: refundPostings({ storeId: refund.storeId, amount, method: payment.method }),
  });
  await takeBack(context, refund.paymentId, id, clientId, amount - Math.max(0, payment.unused));
  await announce(context, 'payment', refund.paymentId, clientId);
  return true;
}

async function takeBack(
  context: Pick<Context, 'shopId'>,
  paymentId: string,
  refundId: string,
  clientId: string,
  settled: number,
): Promise<void> {
  let left = settled;
  if (left <= 0) return;
  const parts = await rows<{ statementId: string; amount: number }>(
    `select a.statement_id as "statementId", sum(a.amount)::bigint as amount
     from allocations a join statements s on s.shop_id = a.shop_id and s.id = a.statement_id
     where a.shop_id = $shopId and a.payment_id = $paymentId
     group by a.statement_id, s.due_on having sum(a.amount) > 0
     order by s.due_on desc, a.statement_id desc`,
    { shopId: context.shopId, paymentId },
  );
  for (const { statementId, amount } of parts) {
    const back = Math.min(left, amount);
    if (back <= 0) return;
    await allocate(context, { clientId, paymentId, statementId, refundId, amount: -back });
    left -= back;
  }
}
