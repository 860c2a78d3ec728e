import { passwordMatches } from '../../core/auth/password';
import { type Problem, problem } from '../../core/problems/problem';
import { type Person, personByEmail } from './people';
import { countTry, forgetTries, giveTryBack, type TryKey } from './sign-in-failures';
import { takeProof } from './take-proof';

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

interface Asked {
  requestId: string;
  now: Date;
}

/** The person the credentials belong to. Works as long for an unknown address as for a known one. */
export async function checkCredentials(
  context: Asked,
  credentials: { email: string; password: string; code?: string },
  key: TryKey,
): Promise<Person> {
  const heard = await countTry(key, context.now);
  const person = await personByEmail(credentials.email);
  const right = await passwordMatches(credentials.password, person?.password_hash ?? null);
  if (!heard || !right || !person?.email_verified_at) throw refused();
  if (person.totp_confirmed_at) await demandCode(context, person, credentials.code, key);
  await forgetTries(key);
  return person;
}

async function demandCode(
  context: Asked,
  person: Person,
  code: string | undefined,
  key: TryKey,
): Promise<void> {
  if (code === undefined) {
    await giveTryBack(key);
    throw problem('code-required', 'Enter the code your authenticator app shows.');
  }
  if (!(await takeProof(context, person, code))) {
    throw problem('sign-in-refused', 'The code is not right, or was used before.');
  }
}
