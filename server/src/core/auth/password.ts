import { createHash } from 'node:crypto';
import bcrypt from 'bcryptjs';
import { config } from '../config';

/** bcrypt reads 72 bytes at most, so the whole password goes in as its digest (NIST SP 800-63B: no cutting). */
function digest(password: string): string {
  return createHash('sha256').update(password.normalize('NFKC')).digest('base64');
}

export function hashPassword(password: string, cost = config().passwordCost): Promise<string> {
  return bcrypt.hash(digest(password), cost);
}

/**
 * Whether the password is the one the hash was made from. Without a hash it works just as long and
 * says no, so that the time of an answer does not tell whether there is such a person.
 */
export async function passwordMatches(password: string, hash: string | null): Promise<boolean> {
  const same = await bcrypt.compare(digest(password), hash ?? hashOfNothing(config().passwordCost));
  return same && hash !== null;
}

/** A well-formed hash that no password is known for. */
function hashOfNothing(cost: number): string {
  return `$2b$${String(cost).padStart(2, '0')}$${'tW'.repeat(11)}${'nO'.repeat(15)}.`;
}
