import { type Context, systemContext } from '../../core/context';
import { platformRows, row, withTenant, write } from '../../core/database/tenancy';
import { enqueueNow } from '../../core/jobs/boss';
import { type Job } from '../../core/jobs/work';
import { type Log } from '../../core/logging';
import { sweepDeliveries } from '../deliveries/sweep-deliveries';
import { sweepImports } from '../imports/work-import';
import { sweepPayments } from '../payments/sweep-payments';
import { sweepStripeEvents } from '../payments/work-stripe-event';
import { sweepPlatformMails } from '../platform-mails/send-platform-mails';
import { sweepSignIn } from '../sign-up/sweep-sign-in';
import { sweepStatements } from '../statements/sweep-statements';
import { sweepSubscriptions } from '../subscription/sweep-subscriptions';
import { sweepAbsorbed } from '../tickets/absorb-ticket';

type Step = [name: string, run: () => Promise<unknown>];

/**
 * Looks once through everything that can fall due or stand still. It asks the tables what there is
 * to do, never the queue, so an hour or a day without a worker loses nothing.
 */
export async function sweep(now: Date, log: Log): Promise<void> {
  await each(
    [
      ['platform mails', sweepPlatformMails],
      ['card payment events', sweepStripeEvents],
      ['subscriptions', () => sweepSubscriptions(now, log)],
      ['sign-in', sweepSignIn],
    ],
    log,
  );
  const shops = await platformRows<{ id: string }>('select id from shops order by id');
  for (const { id } of shops) await sweepShop(systemContext(id, now, 'sweep'), log);
}

/** One shop's trouble, or one step's, must not keep the others waiting. */
export function sweepShop(context: Context, log: Log): Promise<void> {
  return each(
    [
      ['statements', () => sweepStatements(context)],
      ['deliveries', () => sweepDeliveries(context)],
      ['payments', () => sweepPayments(context, log)],
      ['rounds', () => wakeRounds(context)],
      ['imports', () => sweepImports(context)],
      ['absorbed costs', () => sweepAbsorbed(context)],
      ['old keys', () => forgetOldKeys(context)],
    ],
    log.child({ shopId: context.shopId }),
  );
}

async function each(steps: readonly Step[], log: Log): Promise<void> {
  for (const [name, run] of steps) {
    try {
      await run();
    } catch (error) {
      log.error({ err: error, step: name }, 'a step of the sweep failed');
    }
  }
}

/** The hour for which each shop's rounds were last looked at by this process. */
const roundsAt = new Map<string, number>();

/** Rounds are planned weeks ahead: to look once an hour is often enough. */
async function wakeRounds(context: Context): Promise<void> {
  const hour = Math.floor(context.now.getTime() / 3_600_000);
  if (roundsAt.get(context.shopId) === hour) return;
  const contracts = await withTenant(context, () =>
    row('select 1 from contracts where shop_id = $shopId limit 1', { shopId: context.shopId }),
  );
  if (contracts) await enqueueNow('rounds-plan', { shopId: context.shopId });
  roundsAt.set(context.shopId, hour);
}

/** A repeat comes within minutes; after two days a key is a new one. */
function forgetOldKeys(context: Context): Promise<unknown> {
  return withTenant(context, () =>
    write(
      `delete from idempotency_keys
       where shop_id = $shopId and created_at < now() - interval '48 hours'`,
      { shopId: context.shopId },
    ),
  );
}

export const sweepJobs: Job[] = [
  {
    queue: 'sweep',
    async work(_data, { log }) {
      await sweep(new Date(), log);
    },
  },
];
