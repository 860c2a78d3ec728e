import { type PlatformContext } from '../../core/context';
import { type Bind, platformRow, platformRows, withPlatform } from '../../core/database/tenancy';
import { instantOrNull } from '../../core/database/times';
import { type AnswerOf, type InputOf } from '../../core/http/route';
import { enqueueNow } from '../../core/jobs/boss';
import { platformPage } from '../../core/lists/keyset';
import { found, problem } from '../../core/problems/problem';
import { recordPlatform } from './record-platform';

type Mail = AnswerOf<'platform.decideMail'>;

interface MailRow {
  id: string;
  shop_id: string | null;
  recipient: string;
  template: string;
  state: Mail['state'];
  attempt: number;
  last_error: string | null;
  next_attempt_at: Date;
  sent_at: Date | null;
  created_at: Date;
}

const columns = `m.id, m.shop_id, m.recipient, m.template, m.state, m.attempt, m.last_error,
  m.next_attempt_at, m.sent_at, m.created_at`;

/** Enough to recognise an address one knows, too little to learn one. */
export function masked(address: string): string {
  const at = address.lastIndexOf('@');
  return `${address.slice(0, Math.min(1, at))}...${address.slice(at)}`;
}

function present(mail: MailRow): Mail {
  return {
    id: mail.id,
    shopId: mail.shop_id,
    recipient: masked(mail.recipient),
    template: mail.template,
    state: mail.state,
    attempt: mail.attempt,
    // A server's refusal often repeats the address.
    lastError: mail.last_error?.replaceAll(mail.recipient, masked(mail.recipient)) ?? null,
    nextAttemptAt: mail.next_attempt_at.toISOString(),
    sentAt: instantOrNull(mail.sent_at),
    createdAt: mail.created_at.toISOString(),
  };
}

export function listMails(
  query: InputOf<'platform.mails'>['query'],
): Promise<AnswerOf<'platform.mails'>> {
  const bind: Bind = {};
  const where = ['true'];
  if (query.state) {
    where.push('m.state = $state');
    bind.state = query.state;
  }
  if (query.q) {
    // By the whole address only: a search by parts would undo the masking.
    where.push('m.recipient = $recipient');
    bind.recipient = query.q.trim().toLowerCase();
  }
  return platformPage<MailRow, Mail>(
    {
      select: `select ${columns} from platform_mails m`,
      from: 'platform_mails m',
      where,
      bind,
      sort: { column: 'm.created_at', type: 'timestamptz', descending: true },
      id: 'm.id',
      limit: query.limit,
      cursor: query.cursor,
    },
    present,
  );
}

/** What no program may decide: whether a mail whose answer was lost had arrived. */
export function decideMail(
  context: PlatformContext,
  mailId: string,
  decision: 'arrived' | 'send_again',
): Promise<Mail> {
  return withPlatform(async () => {
    const mail = found(
      await platformRow<MailRow>(
        `select ${columns} from platform_mails m where m.id = $mailId for update`,
        { mailId },
      ),
    );
    const wanted = decision === 'arrived' ? 'sent' : 'waiting';
    if (mail.state === wanted) return present(mail);
    const decidable = ['uncertain', 'failed'].includes(mail.state);
    if (!decidable) throw problem('conflict', `This mail is ${mail.state}: it needs no decision.`);
    const [decided] = await platformRows<MailRow>(
      `update platform_mails m set state = $wanted, lease_until = null, next_attempt_at = $now,
         attempt = case when $wanted = 'waiting' then 0 else attempt end,
         sent_at = case when $wanted = 'sent' then $now::timestamptz end
       where m.id = $mailId returning ${columns}`,
      { mailId, wanted, now: context.now },
    );
    await recordPlatform(context, `mail decided: ${decision}`, mail.shop_id, { mail: mailId });
    if (wanted === 'waiting') await enqueueNow('platform-mails-send', {});
    return present(found(decided));
  });
}
