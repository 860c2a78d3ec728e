import { type Context } from '../../core/context';
import { rows, withTenant } from '../../core/database/tenancy';
import { refuseWhilePaused } from '../../core/http/paused';
import { Problem } from '../../core/problems/problem';
import { shopFacts } from '../../core/shop-facts';
import { closeMonth, monthDueBySchedule } from './close-month';
import { moveRun } from './move-run';

/**
 * For the sweep: closes the month that the shop's schedule says is due, however long nobody looked,
 * and wakes closes that stand still because the process that worked them is gone.
 */
export async function sweepStatements(context: Context): Promise<void> {
  await closeBySchedule(context);
  const running = await withTenant(context, () =>
    rows<{ id: string }>(
      `select id from statement_runs where shop_id = $shopId and state in ('building', 'sending')`,
      { shopId: context.shopId },
    ),
  );
  for (const { id } of running) await moveRun(context, id, ['build', 'render', 'send']);
}

export async function closeBySchedule(context: Context): Promise<void> {
  try {
    await withTenant(context, async () => {
      const month = await monthDueBySchedule(context, await shopFacts(context));
      if (!month) return;
      await refuseWhilePaused(context);
      await closeMonth(context, month);
    });
  } catch (error) {
    // The button was quicker, or the shop is paused: it is closed when it goes on.
    const expected =
      error instanceof Problem && (error.type === 'conflict' || error.type === 'shop-paused');
    if (!expected) throw error;
  }
}
