import { type Answer, json } from '../http';

/** What becomes of the next calls of the API. */
export type RequestMode = 'normal' | 'drop-before' | 'drop-after' | 'error-500' | 'rate-limit';
export const requestModes: readonly RequestMode[] = [
  'normal',
  'drop-before',
  'drop-after',
  'error-500',
  'rate-limit',
];

export interface Seen {
  at: string;
  method: string;
  path: string;
  account: string | null;
  idempotencyKey: string | null;
  params: unknown;
  status: number | null;
}

const mostKept = 1_000;

/** The requests received, and what tests want to go wrong with the next ones. */
export class Traffic {
  readonly seen: Seen[] = [];
  private mode: RequestMode = 'normal';
  private left = Infinity;
  private path: string | undefined;

  record(entry: Seen): Seen {
    this.seen.push(entry);
    if (this.seen.length > mostKept) this.seen.shift();
    return entry;
  }

  /** For so many requests (all, without `times`), of paths that begin so (all, without `path`). */
  set(mode: RequestMode, times = Infinity, path?: string): void {
    this.mode = mode;
    this.left = times;
    this.path = path;
  }

  modeFor(path: string): RequestMode {
    if (this.mode === 'normal' || (this.path && !path.startsWith(this.path))) return 'normal';
    const mode = this.mode;
    this.left -= 1;
    if (this.left <= 0) this.set('normal');
    return mode;
  }
}

export function parsedBody<T>(body: string): T | undefined {
  try {
    return JSON.parse(body || '{}') as T;
  } catch {
    return undefined;
  }
}

export function refuse(words: string): Answer {
  return json({ error: words }, 400);
}
