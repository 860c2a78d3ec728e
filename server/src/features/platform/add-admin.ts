import { v7 as uuid } from 'uuid';
import { platformRow, platformRows, withPlatform } from '../../core/database/tenancy';
import { found } from '../../core/problems/problem';
import { type Person, personByEmail } from '../session/people';
import { mailReset } from '../account/reset-password';

/**
 * Makes a person a platform admin, as whoever runs the installation may; there is no operation for
 * it, so that no stolen session can. Who has no password yet gets a mail to choose one.
 */
export function addAdmin(email: string, name: string): Promise<'added' | 'already'> {
  return withPlatform(async () => {
    const before = await platformRow<{ platform_admin: boolean }>(
      'select platform_admin from users where email = $email',
      { email },
    );
    await platformRows(
      `insert into users (id, email, name, email_verified_at, platform_admin)
       values ($id, $email, $name, now(), true)
       on conflict (email) do update set platform_admin = true`,
      { id: uuid(), email, name },
    );
    const person: Person = found(await personByEmail(email));
    if (!person.password_hash) {
      await mailReset({ now: new Date() }, person);
    }
    await platformRows(
      `insert into platform_audit (id, by_name, what, details)
       values ($id, 'installation', 'platform admin added', $details)`,
      { id: uuid(), details: JSON.stringify({ userId: person.id }) },
    );
    return before?.platform_admin ? 'already' : 'added';
  });
}
