import { setTimeout as wait } from 'node:timers/promises';
import { v7 as uuid } from 'uuid';
import { mailedToken, tokenHash } from '../../core/auth/mailed-token';
import { hashPassword } from '../../core/auth/password';
import { type PublicContext } from '../../core/context';
import { platformRow, platformRows, withPlatform } from '../../core/database/tenancy';
import { type AnswerOf, type InputOf } from '../../core/http/route';
import { found } from '../../core/problems/problem';
import { queuePlatformMail } from '../platform-mails/queue-platform-mail';
import { tooManyMails } from '../platform-mails/too-many-mails';
import { demandGoodPassword } from '../session/good-password';
import { type Person, personByEmail } from '../session/people';
import { forgetTriesOfAddress } from '../session/sign-in-failures';
import { setPassword } from './change-password';

const message =
  'If there is an account with this address, a mail with a link is on its way. It works for one hour.';
/** Longer than writing a mail takes: what is done for a known address hides in it. */
const answerAfterMs = 150;

/** Mails a link to choose a new password. The answer and its time are the same for any address. */
export async function requestReset(
  context: PublicContext,
  email: string,
): Promise<AnswerOf<'account.requestReset'>> {
  const answerable = wait(answerAfterMs);
  const person = await personByEmail(email);
  if (person && !(await tooManyMails(email))) await mailReset(context, person);
  await answerable;
  return { message };
}

/** Mails a link that lets its holder choose a password. */
export function mailReset(
  context: Pick<PublicContext, 'now'>,
  person: Pick<Person, 'id' | 'email' | 'name'>,
): Promise<void> {
  return withPlatform(async () => {
    const id = uuid();
    await platformRows(
      `insert into mailed_tokens (token_hash, id, user_id, purpose, expires_at)
       values ($hash, $id, $userId, 'reset_password', $now::timestamptz + interval '1 hour')`,
      {
        id,
        hash: tokenHash(mailedToken('reset_password', id)),
        userId: person.id,
        now: context.now,
      },
    );
    await queuePlatformMail({
      to: person.email,
      template: 'reset_password',
      params: { name: person.name, resetId: id },
      dedupeKey: `reset_password:${id}`,
    });
  });
}

/** Sets the new password of whoever holds the mailed link, once. */
export async function completeReset(
  context: PublicContext,
  body: InputOf<'account.reset'>['body'],
): Promise<void> {
  const bind = { hash: tokenHash(body.token), now: context.now };
  const holder = found(
    await platformRow<{ id: string; email: string; name: string }>(
      `select u.id, u.email, u.name from mailed_tokens t join users u on u.id = t.user_id
       where t.token_hash = $hash and t.purpose = 'reset_password'
         and t.used_at is null and t.expires_at > $now`,
      bind,
    ),
  );
  demandGoodPassword(body.password, [holder.name, holder.email]);
  const hash = await hashPassword(body.password);
  await withPlatform(async () => {
    const [used] = await platformRows(
      `update mailed_tokens set used_at = $now where token_hash = $hash and used_at is null
       returning id`,
      bind,
    );
    found(used);
    // Older links of the same person end with this one.
    await platformRows(
      `update mailed_tokens set used_at = $now
       where user_id = $userId and purpose = 'reset_password' and used_at is null`,
      { userId: holder.id, now: context.now },
    );
    await setPassword(context, holder, hash, null);
    await forgetTriesOfAddress(holder.email);
  });
}
