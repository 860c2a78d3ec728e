import { v7 as uuid } from 'uuid';
import { type Context } from '../../core/context';
import { write } from '../../core/database/tenancy';
import { unusedCredits } from './open-statements';

/** A new statement, and what is to be paid of it. */
interface NewStatement {
  id: string;
  storeId: string;
  clientId: string;
  open: number;
}

/** Uses what stores paid ahead for their new statements, the oldest payment first. */
export async function applyCredits(
  context: Pick<Context, 'shopId'>,
  statements: readonly NewStatement[],
): Promise<void> {
  const owing = statements.filter(({ open }) => open > 0);
  const credits = await unusedCredits(
    context,
    owing.map(({ storeId }) => storeId),
  );
  for (const { id: statementId, storeId, clientId, ...owed } of owing) {
    let { open } = owed;
    for (const { paymentId, credit } of credits.filter((each) => each.storeId === storeId)) {
      const amount = Math.min(open, credit);
      if (amount <= 0) break;
      await allocate(context, { clientId, paymentId, statementId, amount });
      open -= amount;
    }
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
