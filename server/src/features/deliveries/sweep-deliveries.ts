import { type Context } from '../../core/context';
import { rows, withTenant, write } from '../../core/database/tenancy';
import { metrics } from '../../core/http/metrics';
import { enqueue } from '../../core/jobs/boss';
import { announce } from '../../core/live/live';
import { settleLost } from '../../core/mail/settle';

/** For the sweep: mails whose process died in the middle, and mails whose time to try again came. */
export function sweepDeliveries(context: Context): Promise<void> {
  return withTenant(context, async () => {
    const { state, error } = settleLost();
    const lost = await write<{ id: string; runId: string }>(
      `update deliveries d set state = $state, last_error = $error, lease_until = null
       from statements s
       where d.shop_id = $shopId and d.state = 'handing_over' and d.lease_until < now()
         and s.shop_id = d.shop_id and s.id = d.statement_id
       returning d.id, s.run_id as "runId"`,
      { shopId: context.shopId, state, error },
    );
    metrics.deliveries.inc({ state }, lost.length);
    for (const runId of new Set(lost.map((one) => one.runId))) {
      await announce(context, 'statement-run', runId);
    }
    const due = await rows(
      `select 1 from deliveries
       where shop_id = $shopId and state = 'waiting' and next_attempt_at <= now() limit 1`,
      { shopId: context.shopId },
    );
    if (due.length) await enqueue('deliveries-send', { shopId: context.shopId });
  });
}
