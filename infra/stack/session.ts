import { mkdirSync, rmSync } from 'node:fs';
import path from 'node:path';
import { reportAndExit } from '../bootstrap/progress.cjs';
import { writeState } from '../process/state-file';
import { endLeftOvers, lockPath, refuseSecondStart } from './run-file';
import { type Stack } from './stack';

interface Stoppable {
  stop(): Promise<void>;
}

/**
 * Runs a stack at the keyboard: one at a time per data folder, ended in order by Ctrl-C, SIGTERM or
 * a closed terminal, and by force when asked a second time.
 */
export async function runAtKeyboard(
  stack: Stack,
  start: () => Promise<void>,
  others: Stoppable[] = [],
): Promise<void> {
  const { dataDir } = stack.options;
  refuseSecondStart(dataDir);
  mkdirSync(dataDir, { recursive: true });
  const lock = lockPath(dataDir);
  writeState(lock, { pid: process.pid });

  let stopping = false;
  const stop = async (code: number): Promise<void> => {
    stopping = true;
    await Promise.all(others.map((other) => other.stop()));
    await stack.stop();
    rmSync(lock, { force: true });
    process.exitCode = code;
    process.exit();
  };
  const onSignal = (): void => {
    if (stopping) {
      stack.forceStop();
      process.exit(130);
    }
    process.stdout.write('\nStopping (Ctrl-C again to force) ...\n');
    stop(0).then(undefined, reportAndExit);
  };
  for (const name of ['SIGINT', 'SIGTERM', 'SIGHUP'] as const) process.on(name, onSignal);
  // A closed terminal must not keep the rest from ending in order.
  process.stdout.on('error', () => undefined);

  try {
    await endLeftOvers(dataDir);
    await start();
  } catch (error) {
    if (stopping) return;
    stopping = true;
    await Promise.all(others.map((other) => other.stop()));
    await stack.stop();
    rmSync(lock, { force: true });
    throw error;
  }
}

/** A path as one would type it from here, when that is shorter. */
export function shortPath(file: string): string {
  const relative = path.relative(process.cwd(), file);
  return relative.startsWith('..') ? file : relative;
}
