import { v7 as uuid } from 'uuid';
import { hashPassword } from '../../server/src/core/auth/password';
import { platformRows } from '../../server/src/core/database/tenancy';
import { next, type TestPerson } from './factories';

export const goodPassword = 'eleven wet towels';

/** Lets a person of the factories sign in with `goodPassword`. */
export async function givePassword(person: Pick<TestPerson, 'userId'>): Promise<void> {
  await platformRows('update users set password_hash = $hash where id = $id', {
    id: person.userId,
    hash: await hashPassword(goodPassword),
  });
}

/** A platform admin who can sign in. */
export async function buildAdmin(): Promise<{ userId: string; email: string }> {
  const userId = uuid();
  const email = `admin-${next()}-${userId.slice(-6)}@platform.example`;
  await platformRows(
    `insert into users (id, email, name, password_hash, email_verified_at, platform_admin)
     values ($userId, $email, 'Ada Admin', $hash, now(), true)`,
    { userId, email, hash: await hashPassword(goodPassword) },
  );
  return { userId, email };
}
