import { spawnSync } from 'node:child_process';
import { createHash } from 'node:crypto';
import { existsSync, mkdirSync, readFileSync, statSync } from 'node:fs';
import path from 'node:path';
import { Advice } from '../bootstrap/progress.cjs';

/** Whom PostgreSQL runs as: it refuses to run as root, so root lends it an ordinary user. */
export interface RunAs {
  uid?: number;
  gid?: number;
}

function systemUser(name: string): Required<RunAs> | undefined {
  const line = readFileSync('/etc/passwd', 'utf8')
    .split('\n')
    .find((entry) => entry.startsWith(`${name}:`));
  const [, , uid, gid] = line?.split(':') ?? [];
  return uid && gid ? { uid: Number(uid), gid: Number(gid) } : undefined;
}

function userForRoot(): Required<RunAs> {
  const user = systemUser('postgres') ?? systemUser('nobody');
  if (user) return user;
  throw new Advice(
    'PostgreSQL does not run as root, and there is neither a user "postgres" nor "nobody".',
    'Run the command as an ordinary user, or add one: useradd --system postgres',
  );
}

export function runAsFor(dataFolder: string): RunAs {
  const self = process.getuid?.();
  if (self === undefined) return {};
  const owner = existsSync(dataFolder) ? statSync(dataFolder) : undefined;
  if (self === 0) {
    return owner && owner.uid !== 0 ? { uid: owner.uid, gid: owner.gid } : userForRoot();
  }
  if (owner && owner.uid !== self) {
    throw new Advice(
      `The database files in ${dataFolder} belong to another user (number ${owner.uid}).`,
      'Start as that user (or as root), or set DATA_DIR to a folder of your own.',
    );
  }
  return {};
}

function canEnter(folder: string, runAs: RunAs): boolean {
  const tried = spawnSync('/bin/sh', ['-c', 'cd "$0"', folder], {
    ...runAs,
    cwd: '/',
    stdio: 'ignore',
  });
  return tried.status === 0;
}

/**
 * Where the database files are kept: inside `folder`, unless the lent user cannot get there
 * because the checkout lies in a private home. Then in /var/lib, under a name made from `folder`.
 */
export function chooseDataFolder(folder: string): string {
  mkdirSync(folder, { recursive: true });
  const inside = path.join(folder, 'files');
  if (process.getuid?.() !== 0 || existsSync(inside)) return inside;
  if (canEnter(folder, userForRoot())) return inside;
  const name = createHash('sha256').update(path.resolve(folder)).digest('hex').slice(0, 12);
  const outside = `/var/lib/tumblewright-${name}`;
  mkdirSync(outside, { recursive: true, mode: 0o755 });
  return path.join(outside, 'files');
}
