import { allocatePayment, type PaymentMethod, paymentPostings } from '@lib/domain';
import { type Context } from '../../core/context';
import { nextNumber } from '../../core/counters';
import { row, write } from '../../core/database/tenancy';
import { announce } from '../../core/live/live';
import { found } from '../../core/problems/problem';
import { postDocument } from '../ledger/post';
import { allocate } from '../receivables/apply-credits';
import { openStatements } from '../receivables/open-statements';

/** Payments and statements of a store take turns on the store's row. */
export async function lockStore(
  context: Pick<Context, 'shopId'>,
  storeId: string,
): Promise<{ clientId: string; name: string }> {
  return found(
    await row<{ clientId: string; name: string }>(
      `select client_id as "clientId", name from stores
       where shop_id = $shopId and id = $storeId for no key update`,
      { shopId: context.shopId, storeId },
    ),
  );
}

/**
 * Posts a payment whose money is there: gives it its number, its entries, and applies it to what is
 * open, oldest first; what is left over stays as credit. A payment that is posted already is left
 * as it is, so the same word may come any number of times, in any order.
 *
 * @returns whether it was posted now
 */
export async function postPayment(
  context: Pick<Context, 'shopId'>,
  payment: { id: string; storeId: string; amount: number; receivedOn: string; intent?: string },
): Promise<boolean> {
  const { clientId } = await lockStore(context, payment.storeId);
  const bind = { shopId: context.shopId, id: payment.id };
  const open = await row<{ method: PaymentMethod }>(
    `select method from payments
     where shop_id = $shopId and id = $id and state <> 'succeeded' for update`,
    bind,
  );
  if (!open) return false;
  await write(
    `update payments set state = 'succeeded', number = $number, amount = $amount,
       received_on = $receivedOn, card_intent = coalesce($intent, card_intent), problem = null
     where shop_id = $shopId and id = $id`,
    {
      ...bind,
      number: await nextNumber(context, 'payment'),
      amount: payment.amount,
      receivedOn: payment.receivedOn,
      intent: payment.intent ?? null,
    },
  );
  await postDocument(context, {
    kind: 'payment',
    id: payment.id,
    clientId,
    postedOn: payment.receivedOn,
    postings: paymentPostings({
      storeId: payment.storeId,
      amount: payment.amount,
      method: open.method,
    }),
  });
  const owed = await openStatements(context, [payment.storeId]);
  for (const part of allocatePayment(owed, payment.amount).allocations) {
    await allocate(context, {
      clientId,
      paymentId: payment.id,
      statementId: part.id,
      amount: part.amount,
    });
  }
  await announce(context, 'payment', payment.id, clientId);
  return true;
}
