import { Secret, TOTP } from 'otpauth';
import { seal, unseal } from '../../core/auth/sealed';
import { platformRows } from '../../core/database/tenancy';
import { type Person } from './people';

const period = 30;

/** RFC 6238 as every authenticator app reads it: SHA-1, six digits, half a minute. */
function totp(secret: Secret, email: string): TOTP {
  return new TOTP({
    issuer: 'Tumblewright',
    label: email,
    algorithm: 'SHA1',
    digits: 6,
    period,
    secret,
  });
}

/** A fresh secret for an authenticator app, and how it is kept. */
export function newCodeSecret(email: string): { secret: string; uri: string; sealed: string } {
  const secret = new Secret({ size: 20 });
  const { base32 } = secret;
  return { secret: base32, uri: totp(secret, email).toString(), sealed: seal(base32) };
}

/**
 * Takes a code: of the current step or a neighbour (clocks drift), and each step once, so that a
 * code looked over somebody's shoulder is worth nothing (RFC 6238, 5.2).
 */
export async function takeCode(
  person: Pick<Person, 'id' | 'email' | 'totp_secret'>,
  code: string,
  now: Date,
): Promise<boolean> {
  const secret = readable(person.totp_secret);
  if (secret === null) return false;
  const generator = totp(Secret.fromBase32(secret), person.email);
  const delta = generator.validate({ token: code, timestamp: now.getTime(), window: 1 });
  if (delta === null) return false;
  const step = Math.floor(now.getTime() / 1000 / period) + delta;
  const taken = await platformRows(
    `update users set totp_last_step = $step
     where id = $id and coalesce(totp_last_step, -1) < $step returning id`,
    { id: person.id, step },
  );
  return taken.length === 1;
}

/** Sealed under another SESSION_SECRET it cannot be read: no code is right, and that is the answer. */
function readable(sealed: string | null): string | null {
  try {
    return sealed && unseal(sealed);
  } catch {
    return null;
  }
}
