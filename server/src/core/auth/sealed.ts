import { createCipheriv, createDecipheriv, hkdfSync, randomBytes } from 'node:crypto';
import { config } from '../config';

const algorithm = 'aes-256-gcm';

function key(): Buffer {
  return Buffer.from(hkdfSync('sha256', config().sessionSecret, '', 'tumblewright:sealed', 32));
}

/** A secret that must be read again (of one-time codes), so that a copy of the database is no use. */
export function seal(secret: string): string {
  const nonce = randomBytes(12);
  const cipher = createCipheriv(algorithm, key(), nonce);
  const sealed = Buffer.concat([cipher.update(secret, 'utf8'), cipher.final()]);
  return Buffer.concat([nonce, cipher.getAuthTag(), sealed]).toString('base64url');
}

export function unseal(sealed: string): string {
  const bytes = Buffer.from(sealed, 'base64url');
  const decipher = createDecipheriv(algorithm, key(), bytes.subarray(0, 12));
  decipher.setAuthTag(bytes.subarray(12, 28));
  return Buffer.concat([decipher.update(bytes.subarray(28)), decipher.final()]).toString('utf8');
}
