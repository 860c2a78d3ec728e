import { createHash } from 'node:crypto';
import { existsSync, mkdirSync } from 'node:fs';
import path from 'node:path';
import { canEnter, lentUser } from './lent-user';

/**
 * Where the database files are kept: inside `folder`, unless the lent user cannot get there
 * because the checkout lies in a private home. Then in /var/lib, under a name made from `folder`.
 */
export function chooseDataFolder(folder: string): string {
  mkdirSync(folder, { recursive: true });
  const inside = path.join(folder, 'files');
  if (process.getuid?.() !== 0 || existsSync(inside)) return inside;
  if (canEnter(folder, lentUser())) return inside;
  const name = createHash('sha256').update(path.resolve(folder)).digest('hex').slice(0, 12);
  const outside = `/var/lib/tumblewright-${name}`;
  mkdirSync(outside, { recursive: true, mode: 0o755 });
  return path.join(outside, 'files');
}
