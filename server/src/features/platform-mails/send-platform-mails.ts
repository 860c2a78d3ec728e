import { type Config } from '../../core/config';
import { platformRow, platformRows } from '../../core/database/tenancy';
import { metrics } from '../../core/http/metrics';
import { enqueueNow } from '../../core/jobs/boss';
import { type HandedOver, type MailSession, mailSession } from '../../core/mail/mailer';
import { leaseSeconds, type Settled, settle, settleLost } from '../../core/mail/settle';
import { type PlatformMailParams, type PlatformMailTemplate, writeMail } from './templates';

interface Claimed {
  id: string;
  recipient: string;
  template: PlatformMailTemplate;
  params: PlatformMailParams[PlatformMailTemplate];
  message_id: string;
  attempt: number;
}

/** Hands over every mail that is due, one after the other, until none is. */
export async function sendPlatformMails(mail: Config['mail']): Promise<void> {
  await giveUpLost();
  const session = mailSession(mail);
  try {
    for (let next = await claim(); next; next = await claim()) {
      const settled = settle(await handOver(session, next), next.attempt, new Date());
      await write(next, settled);
      metrics.deliveries.inc({ state: settled.state });
    }
  } finally {
    session.close();
  }
}

/** For the sweep, every minute: mails whose process died, and mails whose time to try again came. */
export async function sweepPlatformMails(): Promise<void> {
  await giveUpLost();
  const due = await platformRow(
    `select 1 from platform_mails where state = 'waiting' and next_attempt_at <= now() limit 1`,
  );
  if (due) await enqueueNow('platform-mails-send', {});
}

/** Takes one due mail for this attempt, and commits that before anything is said to the server. */
async function claim(): Promise<Claimed | undefined> {
  return platformRow<Claimed>(
    `update platform_mails
     set state = 'handing_over', attempt = attempt + 1,
         lease_until = now() + make_interval(secs => $leaseSeconds)
     where id = (select id from platform_mails
       where state = 'waiting' and next_attempt_at <= now()
       order by next_attempt_at limit 1 for update skip locked)
     returning id, recipient, template, params, message_id, attempt`,
    { leaseSeconds },
  );
}

async function handOver(session: MailSession, claimed: Claimed): Promise<HandedOver> {
  let written: ReturnType<typeof writeMail>;
  try {
    written = writeMail(claimed.template, claimed.params);
  } catch (error) {
    return { outcome: 'failed', error: `The mail could not be written: ${String(error)}` };
  }
  return session.handOver({
    ...written,
    to: { name: claimed.params.name, address: claimed.recipient },
    messageId: claimed.message_id,
  });
}

/** Only the attempt that holds the mail may say how it ended. */
async function write(claimed: Claimed, settled: Settled): Promise<void> {
  await platformRows(
    `update platform_mails
     set state = $state, last_error = $error, lease_until = null,
         sent_at = case when $state = 'sent' then now() end,
         next_attempt_at = coalesce($nextAttemptAt, next_attempt_at)
     where id = $id and attempt = $attempt and state = 'handing_over'`,
    { id: claimed.id, attempt: claimed.attempt, ...settled },
  );
}

async function giveUpLost(): Promise<void> {
  const { state, error } = settleLost();
  const lost = await platformRows(
    `update platform_mails set state = $state, last_error = $error, lease_until = null
     where state = 'handing_over' and lease_until < now() returning id`,
    { state, error },
  );
  metrics.deliveries.inc({ state }, lost.length);
}
