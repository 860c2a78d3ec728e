import { type Context } from '../../core/context';
import { rows, withTenant, write } from '../../core/database/tenancy';
import { leaseSeconds } from '../../core/mail/settle';
import { type StoredSnapshot } from '../statements/stored-snapshot';

/** Due mails looked up at once. */
const ahead = 60;

/** A mail that was due when it was looked up; whose it is to hand over, `claim` decides. */
export interface DueMail {
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

export interface Claimed extends DueMail {
  attempt: number;
}

/** The mails of a shop that are due, for all lanes that hand them over. */
export interface MailLine {
  mails: DueMail[];
  /** Looks due mails up once, however many lanes wait for it. */
  fill(): Promise<void>;
}

export function mailLine(context: Context): MailLine {
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
export async function claimFirst(context: Context, line: MailLine): Promise<Claimed | undefined> {
  for (;;) {
    if (line.mails.length === 0) await line.fill();
    if (line.mails.length === 0) return undefined;
    const claimed = await withTenant(context, () => claimNext(context, line));
    if (claimed) return claimed;
  }
}

/** The next mail of the line that is still to be had; nothing when the line is at its end. */
export async function claimNext(context: Context, line: MailLine): Promise<Claimed | undefined> {
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
