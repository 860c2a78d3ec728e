import QRCode from 'qrcode';
import { type SignedInContext } from '../../core/context';
import { platformRow, platformRows, withPlatform } from '../../core/database/tenancy';
import { type AnswerOf } from '../../core/http/route';
import { found, problem } from '../../core/problems/problem';
import { recordPlatform } from '../platform/record-platform';
import { queuePlatformMail } from '../platform-mails/queue-platform-mail';
import { newCodeSecret } from '../session/one-time-code';
import { type Person, personById } from '../session/people';
import { forgetRecoveryCodes, newRecoveryCodes } from '../session/recovery-codes';
import { countTry, forgetTries, tryKey } from '../session/sign-in-failures';
import { takeProof } from '../session/take-proof';

/** Shop owners and platform admins: whose password opens most. */
export async function mayUseCodes(person: Pick<Person, 'id' | 'platform_admin'>): Promise<boolean> {
  if (person.platform_admin) return true;
  const owner = await platformRow(
    `select 1 from memberships where user_id = $userId and role = 'shop_owner' and ended_at is null
     limit 1`,
    { userId: person.id },
  );
  return owner !== undefined;
}

/** A fresh secret, not yet in force: a code made from it must be shown first. */
export async function startCodes(context: SignedInContext): Promise<AnswerOf<'account.startTotp'>> {
  const person = found(await personById(context.userId));
  if (!(await mayUseCodes(person))) {
    throw problem('not-allowed', 'One-time codes are for shop owners and platform admins.');
  }
  const { secret, uri, sealed } = newCodeSecret(person.email);
  const started = await platformRows(
    `update users set totp_secret = $sealed, totp_last_step = null
     where id = $id and totp_confirmed_at is null returning id`,
    { id: person.id, sealed },
  );
  if (!started.length) throw inForce();
  return { secret, uri, qrSvg: await QRCode.toString(uri, { type: 'svg', margin: 4 }) };
}

/** Puts the codes in force, and answers with what lets their owner in without the device. */
export async function confirmCodes(
  context: SignedInContext,
  code: string,
): Promise<AnswerOf<'account.confirmTotp'>> {
  const person = found(await personById(context.userId));
  if (person.totp_confirmed_at) throw inForce();
  if (!person.totp_secret) throw problem('conflict', 'Begin with a fresh secret first.');
  await demandRightCode(context, person, code);
  const recovery = await newRecoveryCodes(person.id);
  await withPlatform(async () => {
    const confirmed = await platformRows(
      `update users set totp_confirmed_at = $now
       where id = $id and totp_confirmed_at is null returning id`,
      { id: person.id, now: context.now },
    );
    if (!confirmed.length) throw inForce();
    await recovery.keep();
    await recordPlatform(context, 'recovery codes made', null);
  });
  return { recoveryCodes: recovery.shown };
}

export async function removeCodes(context: SignedInContext, code: string): Promise<void> {
  const person = found(await personById(context.userId));
  if (!person.totp_confirmed_at) throw problem('conflict', 'One-time codes are not in force.');
  await demandRightCode(context, person, code);
  await withPlatform(async () => {
    await platformRows(
      'update users set totp_secret = null, totp_confirmed_at = null where id = $id',
      { id: person.id },
    );
    await forgetRecoveryCodes(person.id);
    await recordPlatform(context, 'one-time codes stopped', null);
    await queuePlatformMail({
      to: person.email,
      template: 'one_time_codes_stopped',
      params: { name: person.name },
      dedupeKey: `one_time_codes_stopped:${person.id}:${context.requestId}`,
    });
  });
}

async function demandRightCode(
  context: SignedInContext,
  person: Person,
  code: string,
): Promise<void> {
  const key = tryKey(person.email, context.sessionId, undefined);
  const heard = await countTry(key, context.now);
  if (!heard || !(await takeProof(context, person, code))) {
    throw problem('sign-in-refused', 'The code is not right, or was used before.');
  }
  await forgetTries(key);
}

function inForce() {
  return problem('conflict', 'One-time codes are in force already: remove them first.');
}
