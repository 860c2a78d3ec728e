import { setTimeout as wait } from 'node:timers/promises';
import { type Config } from '../../core/config';
import { type Context, systemContext } from '../../core/context';
import { withTenant, write } from '../../core/database/tenancy';
import { metrics } from '../../core/http/metrics';
import { type Job } from '../../core/jobs/work';
import { type HandedOver, type Mail, type MailSession, mailSession } from '../../core/mail/mailer';
import { type Settled, settle } from '../../core/mail/settle';
import { shopFacts, type ShopFacts } from '../../core/shop-facts';
import { moveRun } from '../statements/move-run';
import { type Claimed, claimFirst, claimNext, type MailLine, mailLine } from './mail-line';
import { writeStatementMail } from './write-statement-mail';

/** Conversations with the mail server at once, of one shop's job. */
const lanes = 3;
/** Mails after which the page of a month close is told how far it is. */
const tellEvery = 20;

export const sendDeliveriesJob: Job = {
  queue: 'deliveries-send',
  async work(data, { config }) {
    await sendDeliveries(systemContext(String(data.shopId), new Date()), config);
  },
};

/** Shops whose mails this process is sending; `again` when it was woken for one meanwhile. */
const sending = new Map<string, { again: boolean }>();

/** Hands over every mail of a shop that is due. */
export async function sendDeliveries(context: Context, config: Config): Promise<void> {
  const before = sending.get(context.shopId);
  if (before) {
    before.again = true;
    return;
  }
  const work = { again: true };
  sending.set(context.shopId, work);
  try {
    while (work.again) {
      work.again = false;
      await sendDue(context, config);
    }
  } finally {
    sending.delete(context.shopId);
  }
}

async function sendDue(context: Context, config: Config): Promise<void> {
  const shop = await withTenant(context, () => shopFacts(context));
  const runs = new Set<string>();
  const line = mailLine(context);
  const lane = async () => {
    const session = mailSession(config.mail);
    try {
      let sent = 0;
      let next: Claimed | undefined;
      while ((next ??= await claimFirst(context, line))) {
        const { runId } = next;
        runs.add(runId);
        next = await workOne(context, shop, config, session, next, line);
        sent += 1;
        if (sent % tellEvery === 0) await moveRun(context, runId, []);
      }
    } finally {
      session.close();
    }
  };
  const ends = await Promise.allSettled(Array.from({ length: lanes }, lane));
  for (const runId of runs) await moveRun(context, runId, []);
  const broken = ends.find((end) => end.status === 'rejected');
  if (broken) throw broken.reason;
}

/** Hands one over, writes down how that ended and takes the next, both with the same commit. */
async function workOne(
  context: Context,
  shop: ShopFacts,
  config: Config,
  session: MailSession,
  claimed: Claimed,
  line: MailLine,
): Promise<Claimed | undefined> {
  const settled = settle(
    await handOver(context, shop, config, session, claimed),
    claimed.attempt,
    new Date(),
  );
  metrics.deliveries.inc({ state: settled.state });
  return persistently(() =>
    withTenant(context, async () => {
      await writeSettled(context, claimed, settled);
      return claimNext(context, line);
    }),
  );
}

/**
 * What is known of a mail must not be lost to a database that is just restarting: it is all that
 * tells a sent mail from an uncertain one.
 */
async function persistently<T>(work: () => Promise<T>): Promise<T> {
  for (const pause of [500, 1_500, 4_000]) {
    try {
      return await work();
    } catch {
      await wait(pause);
    }
  }
  return work();
}

async function handOver(
  context: Context,
  shop: ShopFacts,
  config: Config,
  session: MailSession,
  claimed: Claimed,
): Promise<HandedOver> {
  let mail: Mail;
  try {
    mail = await writeStatementMail(context, shop, config, claimed);
  } catch (error) {
    // Nothing was said to the mail server yet, so trying again is safe.
    return { outcome: 'retry', error: `The mail could not be written: ${String(error)}` };
  }
  return session.handOver(mail);
}

/** Only the attempt that holds the mail may say how it ended. */
async function writeSettled(context: Context, claimed: Claimed, settled: Settled): Promise<void> {
  await write(
    `update deliveries
     set state = $state, last_error = $error, lease_until = null,
       sent_at = case when $state = 'sent' then now() end,
       next_attempt_at = coalesce($nextAttemptAt::timestamptz, next_attempt_at)
     where shop_id = $shopId and id = $id and attempt = $attempt and state = 'handing_over'`,
    { shopId: context.shopId, id: claimed.id, attempt: claimed.attempt, ...settled },
  );
}
