import { accessSync, constants, existsSync, mkdirSync, rmSync } from 'node:fs';
import path from 'node:path';
import { Advice, progress, reportAndExit } from '../bootstrap/progress.cjs';
import { writeState } from '../process/state-file';
import { stopSignals } from '../process/stop-signals';
import { endLeftOvers, lockPath, refuseSecondStart } from './run-file';
import { type Stack } from './stack';

function claim(dataDir: string, lock: string): void {
  try {
    mkdirSync(dataDir, { recursive: true });
    const written = ['files', 'logs', 'mailbox'].map((name) => path.join(dataDir, name));
    for (const folder of written) if (existsSync(folder)) accessSync(folder, constants.W_OK);
    writeState(lock, { pid: process.pid });
  } catch (error) {
    throw new Advice(
      `The data folder ${dataDir} cannot be written: ${(error as Error).message}`,
      'Start as the user it belongs to, or set DATA_DIR to a folder of your own.',
    );
  }
}

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
  const lock = lockPath(dataDir);
  claim(dataDir, lock);

  let stopping = false;
  const stop = async (code: number): Promise<void> => {
    stopping = true;
    await Promise.all(others.map((other) => other.stop()));
    await stack.stop();
    rmSync(lock, { force: true });
    progress.say('Stopped.');
    process.exit(code);
  };
  const onSignal = stopSignals({
    stop: () => {
      progress.say('\nStopping (Ctrl-C again to force) ...');
      stop(0).then(undefined, reportAndExit);
    },
    force: () => {
      stack.forceStop();
      process.exit(130);
    },
  });
  for (const name of ['SIGINT', 'SIGTERM', 'SIGHUP'] as const) process.on(name, onSignal);
  whenParentIsGone(onSignal);
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

/** npm may be killed without a word to us; then nobody is left who could press Ctrl-C. */
function whenParentIsGone(leave: () => void): void {
  if (!process.env.npm_lifecycle_event) return;
  const parent = process.ppid;
  const timer = setInterval(() => {
    if (process.ppid === parent) return;
    clearInterval(timer);
    leave();
  }, 500);
  timer.unref();
}

/** A path as one would type it from here, when that is shorter. */
export function shortPath(file: string): string {
  const relative = path.relative(process.cwd(), file);
  return relative.startsWith('..') ? file : relative;
}
