import { passwordMatches } from '../../core/auth/password';
import { type SignedInContext } from '../../core/context';
import { platformRow, withPlatform } from '../../core/database/tenancy';
import { type AnswerOf } from '../../core/http/route';
import { found, problem } from '../../core/problems/problem';
import { recordPlatform } from '../platform/record-platform';
import { queuePlatformMail } from '../platform-mails/queue-platform-mail';
import { personById } from '../session/people';
import { newRecoveryCodes } from '../session/recovery-codes';
import { countTry, forgetTries, tryKey } from '../session/sign-in-failures';

/** New recovery codes for who knows the password; those before end in the same transaction. */
export async function renewRecoveryCodes(
  context: SignedInContext,
  password: string,
): Promise<AnswerOf<'account.renewRecoveryCodes'>> {
  const person = found(await personById(context.userId));
  // Whoever sits at an open screen does not know the password, and may not guess it there either.
  const key = tryKey(person.email, context.sessionId, undefined);
  const heard = await countTry(key, context.now);
  const right = await passwordMatches(password, person.password_hash);
  if (!heard || !right) {
    throw problem('sign-in-refused', 'The password is not right. Wait a little, try again.');
  }
  await forgetTries(key);
  const codes = await newRecoveryCodes(person.id);
  await withPlatform(async () => {
    // One renewal after the other, and none beside a removal: the last one's codes are what counts.
    const inForce = await platformRow(
      'select 1 from users where id = $id and totp_confirmed_at is not null for update',
      { id: person.id },
    );
    if (!inForce) throw problem('conflict', 'One-time codes are not in force.');
    await codes.keep();
    await recordPlatform(context, 'recovery codes renewed', null);
    await queuePlatformMail({
      to: person.email,
      template: 'recovery_codes_renewed',
      params: { name: person.name },
      dedupeKey: `recovery_codes_renewed:${person.id}:${context.requestId}`,
    });
  });
  return { recoveryCodes: codes.shown };
}
