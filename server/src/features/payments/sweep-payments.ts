import { type Context } from '../../core/context';
import { rows, withTenant } from '../../core/database/tenancy';
import { type Log } from '../../core/logging';
import { settleCardPayment } from './settle-card-payment';

/** Minutes after which the word of a card payment should have come, and we ask ourselves. */
const overdueMinutes = 5;
const most = 50;

/**
 * Finds card payments whose event never came. Young ones are asked after often, older ones as rarely
 * as they are old, until their page has expired.
 */
export async function sweepPayments(context: Context, log: Log): Promise<void> {
  const waiting = await withTenant(context, () =>
    rows<{ id: string }>(
      `select id from payments
       where shop_id = $shopId and state in ('asked', 'failed') and method = 'card'
         and created_at < $now::timestamptz - interval '${overdueMinutes} minutes'
         and created_at > $now::timestamptz - interval '3 days'
         and (checked_at is null or checked_at <
           $now::timestamptz - greatest(interval '${overdueMinutes} minutes', ($now::timestamptz - created_at) / 4))
       order by created_at limit ${most}`,
      { shopId: context.shopId, now: context.now },
    ),
  );
  for (const { id } of waiting) {
    try {
      await settleCardPayment(context, { id });
    } catch (error) {
      // The card payment service may be away for one and back for the next.
      log.warn({ err: error, paymentId: id }, 'a card payment could not be asked after');
    }
  }
}
