import { existsSync, readFileSync, statSync } from 'node:fs';
import { setTimeout as wait } from 'node:timers/promises';

export function isAlive(pid: number): boolean {
  try {
    process.kill(pid, 0);
  } catch (error) {
    if ((error as NodeJS.ErrnoException).code !== 'EPERM') return false;
  }
  return !isZombie(pid);
}

function isZombie(pid: number): boolean {
  try {
    return /^State:\s+Z/m.test(readFileSync(`/proc/${pid}/status`, 'utf8'));
  } catch {
    return false;
  }
}

/**
 * The command line of a process, to tell ours from a stranger's that was given the same number
 * later. Undefined where the system does not say (no /proc).
 */
function commandLine(pid: number): string | undefined {
  if (!existsSync('/proc/self/cmdline')) return undefined;
  try {
    return readFileSync(`/proc/${pid}/cmdline`, 'utf8').replaceAll('\0', ' ');
  } catch {
    return '';
  }
}

/** Alive, and as far as the system tells, the program we once started. */
export function isOurs(pid: number, mark: string): boolean {
  if (!isAlive(pid)) return false;
  const line = commandLine(pid);
  return line === undefined || line.includes(mark);
}

/** When a process began, in milliseconds as Date.now() counts; undefined where nothing says so. */
function beganAt(pid: number): number | undefined {
  try {
    const boot = /^btime (\d+)$/m.exec(readFileSync('/proc/stat', 'utf8'))?.[1];
    // The name in brackets may hold anything; after it, the twentieth word counts ticks of 10 ms.
    const after = readFileSync(`/proc/${pid}/stat`, 'utf8').split(')').pop() ?? '';
    const ticks = after.trim().split(' ')[19];
    return boot && ticks ? Number(boot) * 1_000 + Number(ticks) * 10 : undefined;
  } catch {
    return undefined;
  }
}

/**
 * Ours, and the one that the file means: after a restart of the machine the number soon belongs to
 * a stranger, who began after the file was written.
 */
export function isNamedBy(file: string, pid: number, mark: string): boolean {
  if (!existsSync(file) || !isOurs(pid, mark)) return false;
  const began = beganAt(pid);
  return began === undefined || began <= statSync(file).mtimeMs + 5_000;
}

export function signal(pid: number, name: NodeJS.Signals): void {
  try {
    process.kill(pid, name);
  } catch (error) {
    if ((error as NodeJS.ErrnoException).code !== 'ESRCH') throw error;
  }
}

/** Waits for the end of a process; false when it is still there after `ms`. */
export async function ended(pid: number, ms: number): Promise<boolean> {
  for (const until = Date.now() + ms; Date.now() < until;) {
    if (!isAlive(pid)) return true;
    await wait(50);
  }
  return !isAlive(pid);
}

/** Asks a process to end, and forces it when it has not within `ms`. */
export async function endProcess(
  pid: number,
  ask: NodeJS.Signals = 'SIGTERM',
  ms = 10_000,
): Promise<void> {
  signal(pid, ask);
  if (await ended(pid, ms)) return;
  signal(pid, 'SIGKILL');
  await ended(pid, 5_000);
}
