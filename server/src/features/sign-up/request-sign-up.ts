import { isCurrencyCode } from '@lib/domain';
import { v7 as uuid } from 'uuid';
import { mailedToken, tokenHash } from '../../core/auth/mailed-token';
import { hashPassword } from '../../core/auth/password';
import { type PublicContext } from '../../core/context';
import { platformRows, withPlatform } from '../../core/database/tenancy';
import { type AnswerOf, type InputOf } from '../../core/http/route';
import { invalid } from '../../core/problems/problem';
import { queuePlatformMail } from '../platform-mails/queue-platform-mail';
import { tooManyMails } from '../platform-mails/too-many-mails';
import { demandGoodPassword } from '../session/good-password';
import { personByEmail } from '../session/people';

const message =
  'A mail with a link is on its way to this address. The shop opens when the link is followed.';

/**
 * Keeps what was typed and mails a link; the shop is opened when the link is followed (open-shop.ts).
 * The same is done for an address that is known and one that is not: only the mail differs.
 */
export async function requestSignUp(
  context: PublicContext,
  body: InputOf<'shops.signUp'>['body'],
): Promise<AnswerOf<'shops.signUp'>> {
  if (
    !isCurrencyCode(body.currency) ||
    !Intl.supportedValuesOf('currency').includes(body.currency)
  ) {
    throw invalid([{ pointer: '/currency', in: 'body', detail: 'is not a currency in use' }]);
  }
  demandGoodPassword(body.password, [body.name, body.email, body.shopName]);
  const passwordHash = await hashPassword(body.password);
  const person = await personByEmail(body.email);
  if (await tooManyMails(body.email)) return { message };
  await withPlatform(async () => {
    const id = uuid();
    await platformRows(
      `insert into sign_ups
         (id, token_hash, email, name, password_hash, shop_name, zone, currency, locale, expires_at)
       values ($id, $tokenHash, $email, $name, $passwordHash, $shopName, $zone, $currency, $locale,
         $now::timestamptz + interval '24 hours')`,
      {
        id,
        tokenHash: tokenHash(mailedToken('sign_up', id)),
        email: body.email,
        name: body.name,
        passwordHash,
        shopName: body.shopName,
        zone: body.zone,
        currency: body.currency,
        locale: body.locale,
        now: context.now,
      },
    );
    await queuePlatformMail({
      to: body.email,
      template: 'confirm_sign_up',
      params: {
        name: person?.name ?? body.name,
        shopName: body.shopName,
        signUpId: id,
        known: person !== undefined,
      },
      dedupeKey: `confirm_sign_up:${id}`,
    });
  });
  return { message };
}

/** For the sweep: what nobody confirmed, and what was confirmed long ago. */
export async function forgetOldSignUps(): Promise<void> {
  await platformRows(`delete from sign_ups where expires_at < now() - interval '7 days'`);
}
