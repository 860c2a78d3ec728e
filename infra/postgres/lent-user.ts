import { spawnSync } from 'node:child_process';
import { existsSync, readFileSync, statSync } from 'node:fs';
import { Advice } from '../bootstrap/progress.cjs';

/** Whom PostgreSQL runs as: it refuses to run as root, so root lends it an ordinary user. */
export interface RunAs {
  uid?: number;
  gid?: number;
  /** Words before a command, and options of spawn, that run it as that user. */
  prefix: readonly string[];
  options: { uid?: number; gid?: number };
}

const ourselves: RunAs = { prefix: [], options: {} };

function systemUser(name: string): { uid: number; gid: number } | undefined {
  const line = readFileSync('/etc/passwd', 'utf8')
    .split('\n')
    .find((entry) => entry.startsWith(`${name}:`));
  const [, , uid, gid] = line?.split(':') ?? [];
  return uid && gid ? { uid: Number(uid), gid: Number(gid) } : undefined;
}

function userForRoot(): { uid: number; gid: number } {
  const user = systemUser('postgres') ?? systemUser('nobody');
  if (user) return user;
  throw new Advice(
    'PostgreSQL does not run as root, and there is neither a user "postgres" nor "nobody".',
    'Run the command as an ordinary user, or add one: useradd --system postgres',
  );
}

export function canEnter(folder: string, { prefix, options }: RunAs): boolean {
  const [program = '', ...args] = [...prefix, '/bin/sh', '-c', 'cd "$0"', folder];
  return spawnSync(program, args, { ...options, cwd: '/', stdio: 'ignore' }).status === 0;
}

function plainly(uid: number, gid: number): RunAs {
  return { uid, gid, prefix: [], options: { uid, gid } };
}

/** The user with one right more: to pass through folders that are closed to it. */
function passingThrough(uid: number, gid: number, right: string): RunAs {
  const who = [`--reuid=${uid}`, `--regid=${gid}`, '--clear-groups'];
  // The bit makes the right count in access(2) too, by which initdb looks for its sister program.
  const bits = '--securebits=+no_setuid_fixup';
  const may = [bits, `--inh-caps=+${right}`, `--ambient-caps=+${right}`];
  return { uid, gid, prefix: ['setpriv', ...who, ...may], options: {} };
}

/**
 * Root lends `uid`. In a chroot or container whose `/` itself is closed, that user could not reach
 * anything at all, its own program included; there it is lent a right to pass through as well.
 */
function lend({ uid, gid }: { uid: number; gid: number }): RunAs {
  const ways = [
    plainly(uid, gid),
    passingThrough(uid, gid, 'dac_read_search'),
    passingThrough(uid, gid, 'dac_override'),
  ];
  const way = ways.find((one) => canEnter('/', one));
  if (way) return way;
  throw new Advice(
    'The folder / is closed to ordinary users, and PostgreSQL does not run as root.',
    'Open it to them: chmod 755 /',
  );
}

let lent: RunAs | undefined;

export function lentUser(): RunAs {
  lent ??= lend(userForRoot());
  return lent;
}

/** Files that exist are served by their owner; new ones by ourselves, or whom root lends. */
export function runAsFor(dataFolder: string): RunAs {
  const self = process.getuid?.();
  if (self === undefined) return ourselves;
  const owner = existsSync(dataFolder) ? statSync(dataFolder) : undefined;
  if (self === 0) {
    if (!owner || owner.uid === 0) return lentUser();
    return owner.uid === lentUser().uid ? lentUser() : lend(owner);
  }
  if (owner && owner.uid !== self) {
    throw new Advice(
      `The database files in ${dataFolder} belong to another user (number ${owner.uid}).`,
      'Start as that user (or as root), or set DATA_DIR to a folder of your own.',
    );
  }
  return ourselves;
}
