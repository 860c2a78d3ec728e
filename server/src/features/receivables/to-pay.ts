import { type Context } from '../../core/context';
import { openStatements, unusedCredits } from './open-statements';

/**
 * What settling a statement and everything before it takes now: payments go to the oldest first, so
 * the one cannot be paid without the other. 0 when there is nothing to pay.
 */
export async function toPayUpTo(
  context: Pick<Context, 'shopId'>,
  storeId: string,
  dueOn: string,
  statementId: string,
): Promise<number> {
  const open = await openStatements(context, [storeId]);
  const upTo = open.filter(
    (item) => item.dueOn < dueOn || (item.dueOn === dueOn && item.id <= statementId),
  );
  return less(upTo, await credit(context, storeId));
}

/** What settling all of a store's statements takes now. */
export async function toPayInAll(
  context: Pick<Context, 'shopId'>,
  storeId: string,
): Promise<number> {
  return less(await openStatements(context, [storeId]), await credit(context, storeId));
}

async function credit(context: Pick<Context, 'shopId'>, storeId: string): Promise<number> {
  const credits = await unusedCredits(context, [storeId]);
  return credits.reduce((sum, each) => sum + each.credit, 0);
}

function less(items: readonly { open: number }[], credit: number): number {
  return Math.max(0, items.reduce((sum, { open }) => sum + open, 0) - credit);
}
