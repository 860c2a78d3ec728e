import { passwordMatches } from '../../core/auth/password';
import { type Problem, problem } from '../../core/problems/problem';
import { takeCode } from './one-time-code';
import { type Person, personByEmail } from './people';
import { countTry, forgetTries, giveTryBack, type TryKey } from './sign-in-failures';

/**
 * One answer for every way to be refused. It must not differ between an unknown address, a wrong
 * password, an address that is not confirmed, and a try that comes too early.
 */
export function refused(): Problem {
  return problem(
    'sign-in-refused',
    'The address and password do not go together, or there were too many tries just now. Check ' +
      'both, wait a little and try again, or choose a new password.',
  );
}

/** The person the credentials belong to. Works as long for an unknown address as for a known one. */
export async function checkCredentials(
  credentials: { email: string; password: string; code?: string },
  key: TryKey,
  now: Date,
): Promise<Person> {
  const heard = await countTry(key, now);
  const person = await personByEmail(credentials.email);
  const right = await passwordMatches(credentials.password, person?.password_hash ?? null);
  if (!heard || !right || !person?.email_verified_at) throw refused();
  if (person.totp_confirmed_at) await demandCode(person, credentials.code, key, now);
  await forgetTries(key);
  return person;
}

async function demandCode(
  person: Person,
  code: string | undefined,
  key: TryKey,
  now: Date,
): Promise<void> {
  if (code === undefined) {
    await giveTryBack(key);
    throw problem('code-required', 'Enter the code your authenticator app shows.');
  }
  if (!(await takeCode(person, code, now))) {
    throw problem('sign-in-refused', 'The one-time code is not right, or was used before.');
  }
}
