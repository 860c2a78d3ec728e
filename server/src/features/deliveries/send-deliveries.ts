import { setTimeout as wait } from 'node:timers/promises';
import { type Config } from '../../core/config';
import { type Context, systemContext } from '../../core/context';
import { rows, withTenant, write } from '../../core/database/tenancy';
import { files } from '../../core/files/file-store';
import { metrics } from '../../core/http/metrics';
import { enqueue } from '../../core/jobs/boss';
import { type Job } from '../../core/jobs/work';
import { announce } from '../../core/live/live';
import { type HandedOver, type Mail, type MailSession, mailSession } from '../../core/mail/mailer';
import { leaseSeconds, type Settled, settle, settleLost } from '../../core/mail/settle';
import { shopFacts, type ShopFacts } from '../../core/shop-facts';
import { moveRun } from '../statements/move-run';
import { type StoredSnapshot } from '../statements/stored-snapshot';
import { statementLetter } from './statement-letter';

/** Conversations with the mail server at once, of one shop's job. */
const lanes = 3;
/** Mails after which the page of a month close is told how far it is. */
const tellEvery = 20;
/** Due mails looked up at once. */
const ahead = 60;

/** A mail that was due when it was looked up; whose it is to hand over, `claim` decides. */
interface DueMail {
  id: string;
  recipient: string;
  recipientName: string;
  subject: string;
  messageId: string;
  statementId: string;
  runId: string;
  snapshot: StoredSnapshot;
  fileName: string | null;
  sha256: string | null;
}

interface Claimed extends DueMail {
  attempt: number;
}

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
      while ((next ??= await claimFrom(context, line))) {
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

interface MailLine {
  mails: DueMail[];
  /** Looks due mails up once, however many lanes wait for it. */
  fill(): Promise<void>;
}

function mailLine(context: Context): MailLine {
  let filling: Promise<void> | undefined;
  const line: MailLine = {
    mails: [],
    fill() {
      filling ??= withTenant(context, () => dueMails(context))
        .then((due) => void line.mails.push(...due))
        .finally(() => (filling = undefined));
      return filling;
    },
  };
  return line;
}

/** The first mail for a lane; nothing when nothing is due. */
async function claimFrom(context: Context, line: MailLine): Promise<Claimed | undefined> {
  for (;;) {
    if (line.mails.length === 0) await line.fill();
    if (line.mails.length === 0) return undefined;
    const claimed = await withTenant(context, () => claimNext(context, line));
    if (claimed) return claimed;
  }
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

/** The next mail of the line that is still to be had; nothing when the line is at its end. */
async function claimNext(context: Context, line: MailLine): Promise<Claimed | undefined> {
  for (let mail = line.mails.shift(); mail; mail = line.mails.shift()) {
    const attempt = await claim(context, mail);
    if (attempt !== undefined) return { ...mail, attempt };
  }
  return undefined;
}

/**
 * Which are due is asked first, and each is then looked up by its key: in the middle of a close the
 * tables have grown since PostgreSQL last counted them, and it would join them by reading all.
 */
function dueMails(context: Context): Promise<DueMail[]> {
  return rows<DueMail>(
    `with due as materialized (
       select w.id, w.statement_id, w.next_attempt_at from deliveries w
       where w.shop_id = $shopId and w.state = 'waiting' and w.next_attempt_at <= now()
         and (select r.state from statements t
           join statement_runs r on r.shop_id = t.shop_id and r.id = t.run_id
           where t.shop_id = w.shop_id and t.id = w.statement_id limit 1) <> 'held'
       order by w.next_attempt_at, w.id limit ${ahead}
     )
     select d.id, d.recipient, d.recipient_name as "recipientName", d.subject,
       d.message_id as "messageId", s.id as "statementId", s.run_id as "runId", s.snapshot,
       a.name as "fileName", a.sha256
     from due
     cross join lateral (
       select * from deliveries where shop_id = $shopId and id = due.id limit 1
     ) d
     cross join lateral (
       select * from statements where shop_id = $shopId and id = due.statement_id limit 1
     ) s
     left join lateral (
       select name, sha256 from attachments
       where shop_id = $shopId and owner_kind = 'statement' and owner_id = due.statement_id
       limit 1
     ) a on true
     order by due.next_attempt_at, due.id`,
    { shopId: context.shopId },
  );
}

/** Takes a mail for this attempt; committed before anything is said to the mail server. */
async function claim(context: Context, mail: DueMail): Promise<number | undefined> {
  const [taken] = await write<{ attempt: number }>(
    `update deliveries d
     set state = 'handing_over', attempt = d.attempt + 1,
       lease_until = now() + make_interval(secs => $leaseSeconds)
     where d.shop_id = $shopId and d.id = $id and d.state = 'waiting'
       and d.next_attempt_at <= now()
       and exists (select 1 from statement_runs r
         where r.shop_id = $shopId and r.id = $runId and r.state <> 'held')
     returning d.attempt`,
    { shopId: context.shopId, id: mail.id, runId: mail.runId, leaseSeconds },
  );
  return taken?.attempt;
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
    mail = await writeMail(context, shop, config, claimed);
  } catch (error) {
    // Nothing was said to the mail server yet, so trying again is safe.
    return { outcome: 'retry', error: `The mail could not be written: ${String(error)}` };
  }
  return session.handOver(mail);
}

async function writeMail(
  context: Context,
  shop: ShopFacts,
  config: Config,
  claimed: Claimed,
): Promise<Mail> {
  if (!claimed.sha256) throw new Error('the PDF is missing');
  const letter = statementLetter({
    shop,
    recipientName: claimed.recipientName,
    subject: claimed.subject,
    snapshot: claimed.snapshot,
    url: `${config.publicUrl}/client/statements/${claimed.statementId}`,
  });
  return {
    ...letter,
    to: { name: claimed.recipientName, address: claimed.recipient },
    subject: claimed.subject,
    messageId: claimed.messageId,
    fromName: shop.mailName || shop.name,
    replyTo: shop.replyTo,
    attachments: [
      {
        filename: claimed.fileName ?? 'statement.pdf',
        content: await files().get(context.shopId, claimed.sha256),
        contentType: 'application/pdf',
      },
    ],
  };
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
