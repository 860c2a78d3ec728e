import { hashPassword, passwordMatches } from '../../core/auth/password';
import { type SignedInContext } from '../../core/context';
import { platformRows, withPlatform } from '../../core/database/tenancy';
import { type InputOf } from '../../core/http/route';
import { found, problem } from '../../core/problems/problem';
import { queuePlatformMail } from '../platform-mails/queue-platform-mail';
import { endSessionsOf } from '../session/end-session';
import { demandGoodPassword } from '../session/good-password';
import { personById } from '../session/people';
import { countTry, forgetTries, tryKey } from '../session/sign-in-failures';

/** Changes the password of who knows the present one, and signs out every other device. */
export async function changePassword(
  context: SignedInContext,
  body: InputOf<'account.changePassword'>['body'],
): Promise<void> {
  const person = found(await personById(context.userId));
  demandGoodPassword(body.password, [person.name, person.email]);
  // Whoever sits at an open screen does not know the password, and may not guess it there either.
  const key = tryKey(person.email, context.sessionId, undefined);
  const heard = await countTry(key, context.now);
  const right = await passwordMatches(body.current, person.password_hash);
  if (!heard || !right) {
    throw problem(
      'sign-in-refused',
      'The present password is not right. Wait a little, try again.',
    );
  }
  await forgetTries(key);
  await setPassword(context, person, await hashPassword(body.password), context.sessionId);
}

/** A new password ends every session but the one named, and the person is told by mail. */
export function setPassword(
  context: { requestId: string },
  person: { id: string; email: string; name: string },
  hash: string,
  keepSession: string | null,
): Promise<void> {
  return withPlatform(async () => {
    await platformRows(
      `update users set password_hash = $hash, email_verified_at = coalesce(email_verified_at, now())
       where id = $id`,
      { id: person.id, hash },
    );
    await endSessionsOf(person.id, 'the password was changed', keepSession);
    await queuePlatformMail({
      to: person.email,
      template: 'password_changed',
      params: { name: person.name },
      dedupeKey: `password_changed:${person.id}:${context.requestId}`,
    });
  });
}
