import { type ChildProcess, spawn } from 'node:child_process';
import {
  closeSync,
  existsSync,
  mkdirSync,
  openSync,
  readFileSync,
  statSync,
  truncateSync,
} from 'node:fs';
import path from 'node:path';
import { setTimeout as wait } from 'node:timers/promises';
import { Advice } from '../bootstrap/progress.cjs';
import { endProcess } from './alive';

export interface ServiceOptions {
  name: string;
  /** The program and its arguments; run by node when it is a .cjs file. */
  command: readonly [string, ...string[]];
  env: Record<string, string>;
  cwd: string;
  logFolder: string;
  /** Answers 200 when the service can do its work. */
  readyUrl: string;
  /** Called after each unexpected end, with what happened and the new process id. */
  onRevived?: (how: string) => void;
  /** Called when it ends again and again, so that reviving makes no sense. */
  onGivenUp?: (error: Error) => void;
}

const largestLog = 20 * 1024 * 1024;
const followParent = path.join(__dirname, 'follow-parent.cjs');

/** A long-running process of ours that is started again when it dies without being asked to. */
export class Service {
  private child: ChildProcess | undefined;
  private stopping = false;
  private deaths: number[] = [];

  constructor(private readonly options: ServiceOptions) {}

  get pid(): number {
    return this.child?.pid ?? 0;
  }

  get logFile(): string {
    return path.join(this.options.logFolder, `${this.options.name}.log`);
  }

  /** Starts it and waits until it is ready. */
  async start(ms = 90_000): Promise<void> {
    this.launch();
    const died = (): boolean =>
      this.stopping || this.child?.exitCode !== null || this.child.signalCode !== null;
    for (const until = Date.now() + ms; Date.now() < until && !died(); await wait(80)) {
      if (await this.isReady()) return;
    }
    if (this.stopping) return;
    const what = died() ? 'ended at once' : `was not ready after ${ms / 1000} s`;
    await this.stop();
    throw this.failure(what);
  }

  async isReady(): Promise<boolean> {
    try {
      const answer = await fetch(this.options.readyUrl, { signal: AbortSignal.timeout(3_000) });
      return answer.ok;
    } catch {
      return false;
    }
  }

  async stop(): Promise<void> {
    this.stopping = true;
    const pid = this.child?.pid;
    if (pid && this.child?.exitCode === null && this.child.signalCode === null) {
      await endProcess(pid, 'SIGTERM', 15_000);
    }
  }

  /** As a crash would; it is revived like after one. */
  kill(signal: NodeJS.Signals = 'SIGKILL'): void {
    this.child?.kill(signal);
  }

  private launch(): void {
    mkdirSync(this.options.logFolder, { recursive: true });
    if (existsSync(this.logFile) && statSync(this.logFile).size > largestLog) {
      truncateSync(this.logFile);
    }
    const log = openSync(this.logFile, 'a', 0o600);
    const [program, ...args] = this.options.command;
    const ofNode = program.endsWith('.cjs');
    const child = spawn(
      ofNode ? process.execPath : program,
      ofNode ? ['--require', followParent, program, ...args] : args,
      {
        cwd: this.options.cwd,
        env: { ...this.options.env, PATH: process.env.PATH },
        // In a group of its own: Ctrl-C at the keyboard is for us, who then stop it in order.
        detached: true,
        stdio: ['ignore', log, log, ...(ofNode ? (['ipc'] as const) : [])],
      },
    );
    closeSync(log);
    child.channel?.unref();
    child.on('error', () => undefined);
    child.once('exit', (code, signal) => {
      if (!this.stopping && this.child === child) void this.revive(signal ?? `code ${code}`);
    });
    this.child = child;
  }

  private async revive(how: string): Promise<void> {
    const now = Date.now();
    this.deaths = [...this.deaths.filter((at) => now - at < 60_000), now];
    // Killed from outside is no defect of its own; ending by itself over and over is.
    if (how !== 'SIGKILL' && this.deaths.length > 5) {
      this.options.onGivenUp?.(this.failure(`ended again and again (${how})`));
      return;
    }
    await wait(Math.min(200 * this.deaths.length, 2_000));
    if (this.stopping) return;
    this.launch();
    this.options.onRevived?.(how);
  }

  private failure(what: string): Advice {
    const log = existsSync(this.logFile) ? readFileSync(this.logFile, 'utf8') : '';
    const lines = log.trimEnd().split('\n').slice(-15);
    const end = lines.map((line) => (line.length > 400 ? `${line.slice(0, 400)} ...` : line));
    return new Advice(
      `The ${this.options.name} process ${what}. Its log ends with:\n${end.join('\n')}`,
      `The whole log: ${this.logFile}`,
    );
  }
}
