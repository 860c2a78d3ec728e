import { createHash, createHmac } from 'node:crypto';
import { config } from '../config';

/** What a mailed link lets its holder do. */
export type TokenPurpose = 'sign_up' | 'reset_password' | 'invitation';

/**
 * The secret of a mailed link. It is made from the id of its row when the mail is written, and the
 * row holds only its hash: whoever reads the database cannot follow anybody's link.
 */
export function mailedToken(purpose: TokenPurpose, id: string): string {
  return createHmac('sha256', config().sessionSecret)
    .update(`mailed:${purpose}:${id}`)
    .digest('base64url');
}

/** What is kept of a token, mailed or in a cookie. A token has 256 random bits: no salt is needed. */
export function tokenHash(token: string): string {
  return createHash('sha256').update(token).digest('base64url');
}
