import { type SignedInContext } from '../../core/context';
import { platformRow, platformRows, withPlatform } from '../../core/database/tenancy';
import { type AnswerOf } from '../../core/http/route';
import { found } from '../../core/problems/problem';
import { orStale } from '../../core/versions';
import { personById } from '../session/people';
import { recoveryCodesLeft } from '../session/recovery-codes';
import { mayUseCodes } from './one-time-codes';

export async function showAccount(context: SignedInContext): Promise<AnswerOf<'account.show'>> {
  const person = found(await personById(context.userId));
  return {
    id: person.id,
    name: person.name,
    email: person.email,
    emailVerified: person.email_verified_at !== null,
    oneTimeCodes: person.totp_confirmed_at !== null,
    oneTimeCodesOffered: await mayUseCodes(person),
    recoveryCodesLeft: await recoveryCodesLeft(person.id),
    version: person.version,
  };
}

/** Each shop knows its people by a name of its own, which follows. */
export function changeName(
  context: SignedInContext,
  version: number,
  name: string,
): Promise<AnswerOf<'account.change'>> {
  return withPlatform(async () => {
    const bind = { id: context.userId };
    const changed = await orStale(
      await platformRows<{ name: string; version: number }>(
        `update users set name = $name where id = $id and version = $version
         returning name, version`,
        { ...bind, name, version },
      ),
      () => platformRow('select 1 from users where id = $id', bind),
    );
    await platformRows(
      'update memberships set name = $name where user_id = $id and ended_at is null',
      { ...bind, name },
    );
    return changed;
  });
}
