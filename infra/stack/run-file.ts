import { existsSync } from 'node:fs';
import path from 'node:path';
import { Advice } from '../bootstrap/progress.cjs';
import { endProcess, isNamedBy } from '../process/alive';
import { readState } from '../process/state-file';

export interface Account {
  role: string;
  shop: string | null;
  email: string;
  password: string;
}

/** `.data/run.json`: where a running application is, for people and for tests. */
export interface RunFile {
  web: string;
  mailbox: string | null;
  stripe: string | null;
  worker: string;
  apiDocument: string;
  /** Reads everything, changes nothing (with DATABASE_URL: the address that was given). */
  database: string;
  pids: Record<'start' | 'web' | 'worker', number> & { postgres: number | null };
  accounts: Account[];
}

export function runFilePath(dataDir: string): string {
  return path.join(dataDir, 'run.json');
}

export function accountsPath(dataDir: string): string {
  return path.join(dataDir, 'accounts.json');
}

export function readAccounts(dataDir: string): Account[] {
  const file = accountsPath(dataDir);
  return existsSync(file) ? (readState<Account[]>(file) ?? []) : [];
}

/** Refuses when the same data folder is in use by a start that still runs. */
export function refuseSecondStart(dataDir: string): void {
  const pid = runningStart(dataDir);
  if (pid === undefined) return;
  const before = readState<RunFile>(runFilePath(dataDir));
  throw new Advice(
    `Tumblewright is running already (process ${pid})${before ? `: ${before.web}` : ''}.`,
    'Stop it with Ctrl-C where it was started, or start another beside it with its own data:\n' +
      '    DATA_DIR=.data/second npm start',
  );
}

export function lockPath(dataDir: string): string {
  return path.join(dataDir, 'start.json');
}

/** The process that holds this data folder now. */
export function runningStart(dataDir: string): number | undefined {
  const lock = lockPath(dataDir);
  const pid = readState<{ pid: number }>(lock)?.pid;
  if (!pid || pid === process.pid || !isNamedBy(lock, pid, 'infra/')) return undefined;
  return pid;
}

/** Ends what a killed start left running; PostgreSQL is looked after by its own folder. */
export async function endLeftOvers(dataDir: string): Promise<void> {
  const file = runFilePath(dataDir);
  const before = readState<RunFile>(file);
  const pids = before ? [before.pids.web, before.pids.worker] : [];
  await Promise.all(
    pids.filter((pid) => pid && isNamedBy(file, pid, 'server')).map((pid) => endProcess(pid)),
  );
}
