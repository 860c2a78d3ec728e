import { randomInt, scrypt } from 'node:crypto';
import { promisify } from 'node:util';
import { platformRow, platformRows, withPlatform } from '../../core/database/tenancy';
import { recordPlatform } from '../platform/record-platform';
import { queuePlatformMail } from '../platform-mails/queue-platform-mail';
import { type Person } from './people';

/** Small letters and digits without those taken for each other: 31, so ten of them are 49.5 bits. */
const alphabet = '23456789abcdefghjkmnpqrstuvwxyz';
const length = 10;
const atOnce = 10;

type Holder = Pick<Person, 'id' | 'email' | 'name'>;
interface Asked {
  requestId: string;
  now: Date;
}

const derive = promisify<string, string, number, Buffer>(scrypt);

/**
 * What is kept of a code. All of a code's randomness could be gone through in a day with a plain
 * digest, so it is stretched (RFC 7914). The salt is the person, so that a code is found by its hash
 * and a table made for one person says nothing of another. No key of the server goes in: these codes
 * must still open the account when SESSION_SECRET, and with it the one-time codes, was lost.
 */
async function hashOf(personId: string, code: string): Promise<string> {
  return (await derive(code, `recovery:${personId}`, 32)).toString('base64url');
}

/** As it was shown, from how it was typed. */
function plain(typed: string): string {
  return typed.replace(/[\s-]/g, '').toLowerCase();
}

export function looksLikeRecoveryCode(typed: string): boolean {
  return plain(typed).length === length;
}

function newCode(): string {
  return Array.from({ length }, () => alphabet.charAt(randomInt(alphabet.length))).join('');
}

/** Fresh codes to keep, and the work that puts them in place of those before. */
export async function newRecoveryCodes(
  personId: string,
): Promise<{ shown: string[]; keep: () => Promise<void> }> {
  const codes = new Set<string>();
  while (codes.size < atOnce) codes.add(newCode());
  const hashes = await Promise.all([...codes].map((code) => hashOf(personId, code)));
  return {
    shown: [...codes].map((code) => `${code.slice(0, 5)}-${code.slice(5)}`),
    keep: async () => {
      await forgetRecoveryCodes(personId);
      await platformRows(
        `insert into recovery_codes (user_id, code_hash)
         select $personId::uuid, hash from jsonb_array_elements_text($hashes::jsonb) as hash`,
        { personId, hashes: JSON.stringify(hashes) },
      );
    },
  };
}

export async function forgetRecoveryCodes(personId: string): Promise<void> {
  await platformRows('delete from recovery_codes where user_id = $personId', { personId });
}

export async function recoveryCodesLeft(personId: string): Promise<number> {
  const left = await platformRow<{ n: number }>(
    'select count(*)::int as n from recovery_codes where user_id = $personId and used_at is null',
    { personId },
  );
  return left?.n ?? 0;
}

/** Takes a code, once: of two that come with it at the same time, the database lets one have it. */
export async function takeRecoveryCode(
  context: Asked,
  person: Holder,
  typed: string,
): Promise<boolean> {
  const hash = await hashOf(person.id, plain(typed));
  return withPlatform(async () => {
    const taken = await platformRows(
      `update recovery_codes set used_at = $now
       where user_id = $personId and code_hash = $hash and used_at is null returning user_id`,
      { personId: person.id, hash, now: context.now },
    );
    if (!taken.length) return false;
    const left = await recoveryCodesLeft(person.id);
    await recordPlatform(actor(context, person), 'recovery code used', null, { left });
    await queuePlatformMail({
      to: person.email,
      template: 'recovery_code_used',
      params: { name: person.name, left },
      dedupeKey: `recovery_code_used:${person.id}:${hash}`,
    });
    return true;
  });
}

/** Who holds the codes acts, also while they are still signing in. */
function actor(context: Asked, person: Pick<Person, 'id' | 'name'>) {
  const { requestId, now } = context;
  return { requestId, now, userId: person.id, name: person.name };
}
