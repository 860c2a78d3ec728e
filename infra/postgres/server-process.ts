import { type ChildProcess, spawn, spawnSync } from 'node:child_process';
import { chmodSync, chownSync, closeSync, mkdirSync, openSync, renameSync, rmSync } from 'node:fs';
import { writeFileSync } from 'node:fs';
import path from 'node:path';
import { Advice } from '../bootstrap/progress.cjs';
import { findPostgres } from '../bootstrap/programs.cjs';
import { quietRun } from '../bootstrap/quiet-run.cjs';
import { type RunAs, runAsFor } from './lent-user';

export function postgresBinaries(): string {
  const bin = findPostgres();
  if (bin) return bin;
  throw new Advice(
    'PostgreSQL 14 or newer was not found.',
    'Install it, as root: apt-get update && apt-get install -y postgresql',
  );
}

function give(file: string, { uid, gid }: RunAs): void {
  if (uid !== undefined && gid !== undefined) chownSync(file, uid, gid);
}

/** Makes the database files beside their place and moves them there whole. */
export async function initialise(dataFolder: string, password: string): Promise<void> {
  const runAs = runAsFor(dataFolder);
  const fresh = `${dataFolder}.new`;
  const passwordFile = `${dataFolder}.password`;
  rmSync(fresh, { recursive: true, force: true });
  mkdirSync(fresh, { recursive: true, mode: 0o700 });
  chmodSync(fresh, 0o700);
  give(fresh, runAs);
  writeFileSync(passwordFile, `${password}\n`, { mode: 0o600 });
  give(passwordFile, runAs);
  const args = [
    `--pgdata=${fresh}`,
    `--pwfile=${passwordFile}`,
    '--username=postgres',
    '--auth=scram-sha-256',
    '--locale=C.UTF-8',
    '--encoding=UTF8',
    '--data-checksums',
    '--no-sync',
    '--no-instructions',
  ];
  try {
    const initdb = path.join(postgresBinaries(), 'initdb');
    const [program = '', ...all] = [...runAs.prefix, initdb, ...args];
    await quietRun(program, all, { ...runAs.options, cwd: '/' });
  } finally {
    rmSync(passwordFile, { force: true });
  }
  renameSync(fresh, dataFolder);
}

const quickButUnsafe = { fsync: 'off', full_page_writes: 'off' };

function settingsFor(port: number, durable: boolean, more: Record<string, string> = {}): string[] {
  const settings: Record<string, string> = {
    port: String(port),
    listen_addresses: '127.0.0.1',
    // No socket file: its path must be short, and a checkout may lie anywhere.
    unix_socket_directories: '',
    max_connections: '200',
    shared_buffers: '256MB',
    effective_cache_size: '1GB',
    max_wal_size: '2GB',
    random_page_cost: '1.1',
    jit: 'off',
    TimeZone: 'UTC',
    log_timezone: 'UTC',
    ...(durable ? {} : quickButUnsafe),
    ...more,
  };
  return Object.entries(settings).flatMap(([name, value]) => ['-c', `${name}=${value}`]);
}

interface Launch {
  bin: string;
  state: { dataFolder: string; port: number };
  logFile: string;
  runAs: RunAs;
  options: { durable: boolean; settings?: Record<string, string> };
}

let setpriv: boolean | undefined;

/** Linux can tell a program when its parent dies; without it a killed test run leaves a server. */
function endsWithParent(): string[] {
  setpriv ??=
    spawnSync('setpriv', ['--pdeathsig', 'INT', 'true'], { stdio: 'ignore' }).status === 0;
  return setpriv ? ['setpriv', '--pdeathsig', 'INT'] : [];
}

export function spawnServer({ bin, state, logFile, runAs, options }: Launch): ChildProcess {
  const log = openSync(logFile, 'a', 0o600);
  const [program = '', ...args] = [
    ...runAs.prefix,
    ...endsWithParent(),
    path.join(bin, 'postgres'),
    '-D',
    state.dataFolder,
    ...settingsFor(state.port, options.durable, options.settings),
  ];
  // In a process group of its own: Ctrl-C at the keyboard is for us, who then stop it in order.
  const child = spawn(program, args, {
    ...runAs.options,
    cwd: '/',
    detached: true,
    stdio: ['ignore', log, log],
  });
  child.on('error', () => undefined);
  closeSync(log);
  return child;
}
