import { v7 as uuid } from 'uuid';
import { type Context } from '../../core/context';
import { write } from '../../core/database/tenancy';
import { unusedCredits } from './open-statements';

/** Uses what a store paid ahead for a new statement, the oldest payment first. */
export async function applyCredits(
  context: Pick<Context, 'shopId'>,
  statement: { id: string; storeId: string; clientId: string; open: number },
): Promise<void> {
  let open = statement.open;
  if (open <= 0) return;
  for (const { paymentId, credit } of await unusedCredits(context, statement.storeId)) {
    const amount = Math.min(open, credit);
    if (amount <= 0) return;
    const { id: statementId, clientId } = statement;
    await allocate(context, { clientId, paymentId, statementId, amount });
    open -= amount;
  }
}

/** Writes down that a payment settles so much of a statement. */
export async function allocate(
  context: Pick<Context, 'shopId'>,
  part: {
    clientId: string;
    paymentId: string;
    statementId: string;
    amount: number;
    refundId?: string;
  },
): Promise<void> {
  await write(
    `insert into allocations (shop_id, id, client_id, payment_id, statement_id, refund_id, amount)
     values ($shopId, $id, $clientId, $paymentId, $statementId, $refundId, $amount)`,
    {
      shopId: context.shopId,
      id: uuid(),
      clientId: part.clientId,
      paymentId: part.paymentId,
      statementId: part.statementId,
      refundId: part.refundId ?? null,
      amount: part.amount,
    },
  );
}
