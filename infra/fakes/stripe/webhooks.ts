import { createHmac } from 'node:crypto';
import { type Books, type Thing } from './books';

/** How events are handed over; tests set it to see what a receiver does. */
export type WebhookMode = 'normal' | 'hold' | 'twice' | 'reversed' | 'badsignature';
export const webhookModes: readonly WebhookMode[] = [
  'normal',
  'hold',
  'twice',
  'reversed',
  'badsignature',
];

const shelf = '_deliveries';
const mostAttempts = 12;
const gatherMs = 250;

export interface WebhookTarget {
  url?: string;
  secret?: string;
}

export function signed(payload: string, secret: string, at: number): string {
  const signature = createHmac('sha256', secret).update(`${at}.${payload}`).digest('hex');
  return `t=${at},v1=${signature}`;
}

/**
 * Delivers events at least once: one after the other, again with growing pauses when not answered
 * with success. What is not delivered yet is kept in the books, so that a restart goes on with it.
 */
export class Webhooks {
  private queue: Thing[] = [];
  private mode: WebhookMode = 'normal';
  private running: Promise<void> | undefined;
  private closed = false;
  private readonly pauses = new Set<() => void>();

  constructor(
    private readonly books: Books,
    private readonly target: WebhookTarget,
  ) {
    const waiting = books.all(shelf, shelf).filter((note) => note.waiting);
    this.queue = waiting.reverse().map((note) => note.event as Thing);
  }

  /** Begins with what an earlier run left over. */
  start(): void {
    this.work();
  }

  get waiting(): number {
    return this.queue.length;
  }

  setMode(mode: WebhookMode): void {
    this.mode = mode;
    if (mode !== 'hold') this.work();
  }

  add(event: Thing): void {
    if (!this.target.url) return;
    this.note(event, true);
    this.queue.push(event);
    if (this.mode !== 'hold') this.work();
  }

  /** Delivers all that was held, whatever the mode; resolves when the queue is empty. */
  async flush(): Promise<void> {
    const before = this.mode;
    if (before === 'hold') this.mode = 'normal';
    this.wake();
    this.work();
    await this.running;
    this.mode = before;
  }

  async close(): Promise<void> {
    this.closed = true;
    this.wake();
    await this.running;
  }

  private wake(): void {
    for (const wake of this.pauses) wake();
  }

  private work(): void {
    this.running ??= this.deliverAll().finally(() => {
      this.running = undefined;
    });
  }

  private async deliverAll(): Promise<void> {
    for (let failures = 0; !this.closed && this.queue.length > 0;) {
      if (this.mode === 'hold') return;
      if (this.mode === 'reversed') await this.pause(gatherMs);
      const event = this.mode === 'reversed' ? this.queue.at(-1) : this.queue[0];
      if (!event || this.closed) return;
      const delivered = await this.deliver(event);
      if (delivered && this.mode === 'twice') await this.deliver(event);
      if (delivered || failures + 1 >= mostAttempts || this.mode === 'badsignature') {
        this.queue = this.queue.filter((one) => one !== event);
        this.note(event, false);
        failures = 0;
      } else {
        failures += 1;
        await this.pause(Math.min(200 * 2 ** failures, 10_000));
      }
    }
  }

  private async deliver(event: Thing): Promise<boolean> {
    const { url = '', secret = '' } = this.target;
    const payload = JSON.stringify(event, null, 2);
    const key = this.mode === 'badsignature' ? `${secret}-wrong` : secret;
    try {
      const answer = await fetch(url, {
        method: 'POST',
        headers: {
          'content-type': 'application/json; charset=utf-8',
          'stripe-signature': signed(payload, key, Math.floor(Date.now() / 1000)),
          'user-agent': 'Stripe/1.0 (local fake)',
        },
        body: payload,
        redirect: 'manual',
        signal: AbortSignal.timeout(15_000),
      });
      await answer.arrayBuffer();
      return answer.ok;
    } catch {
      return false;
    }
  }

  private pause(ms: number): Promise<void> {
    if (this.closed) return Promise.resolve();
    return new Promise((resolve) => {
      const wake = (): void => {
        clearTimeout(timer);
        this.pauses.delete(wake);
        resolve();
      };
      const timer = setTimeout(wake, ms);
      this.pauses.add(wake);
    });
  }

  private note(event: Thing, waiting: boolean): void {
    const { created, id } = event;
    this.books.put(shelf, { id, object: shelf, created, waiting, event: waiting ? event : null });
  }
}
