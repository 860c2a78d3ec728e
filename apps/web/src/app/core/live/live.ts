import { inject, Injectable } from '@angular/core';
import { type LiveKind } from '@lib/contracts/web';
import { filter, Observable, share, type Subscriber } from 'rxjs';
import { Session } from '../session/session';
import { EventReader } from './sse';

export interface LiveEvent {
  /** What changed; `missed`: perhaps anything. */
  readonly kind: LiveKind | 'missed';
  readonly id: string | null;
}

/** The stream was interrupted: anything may have changed meanwhile. */
const missed: LiveEvent = { kind: 'missed', id: null };
const firstPause = 1_000;
const longestPause = 60_000;

/**
 * What changes in the shop while the page is open. Events carry ids only; whoever follows them asks
 * the API again. One connection for the whole tab, open while somebody follows.
 */
@Injectable({ providedIn: 'root' })
export class Live {
  readonly #session = inject(Session);
  readonly events = new Observable<LiveEvent>((to) => {
    const stop = new AbortController();
    void this.#follow(to, stop.signal);
    return () => stop.abort();
  }).pipe(share());

  /** Changes of these kinds, and interruptions, after which everything should be asked again. */
  of(...kinds: readonly LiveKind[]): Observable<LiveEvent> {
    return this.events.pipe(
      filter(({ kind }) => kind === missed.kind || kinds.some((each) => each === kind)),
    );
  }

  async #follow(to: Subscriber<LiveEvent>, stop: AbortSignal): Promise<void> {
    let pause = firstPause;
    for (let round = 0; !stop.aborted; round++) {
      try {
        const connected = await this.#connect(stop);
        if (connected.body) {
          if (round > 0) to.next(missed);
          pause = firstPause;
          await read(connected.body, to);
        }
      } catch {
        // No signal, or the server went away: try again below.
      }
      if (!this.#session.signedIn()) return;
      await waited(pause * (0.5 + Math.random()), stop);
      pause = Math.min(pause * 2, longestPause);
    }
  }

  async #connect(signal: AbortSignal): Promise<Response> {
    const token = this.#session.token();
    const ask = (bearer: string | undefined) =>
      fetch('/api/live', {
        signal,
        headers: {
          Accept: 'text/event-stream',
          ...(bearer ? { Authorization: `Bearer ${bearer}` } : {}),
        },
      });
    const first = await ask(token);
    if (first.status !== 401) return accepted(first);
    return accepted(await ask(await this.#session.renew(token)));
  }
}

function accepted(response: Response): Response {
  if (!response.ok) throw new Error(`Live updates were refused: ${response.status}`);
  return response;
}

async function read(body: ReadableStream<Uint8Array>, to: Subscriber<LiveEvent>): Promise<void> {
  const events = new EventReader();
  const decoder = new TextDecoder();
  const reader = body.getReader();
  for (;;) {
    const { done, value } = await reader.read();
    if (done) return;
    for (const { data } of events.read(decoder.decode(value, { stream: true }))) {
      to.next(JSON.parse(data) as LiveEvent);
    }
  }
}

function waited(milliseconds: number, stop: AbortSignal): Promise<void> {
  return new Promise((resolve) => {
    const timer = setTimeout(resolve, milliseconds);
    stop.addEventListener('abort', () => {
      clearTimeout(timer);
      resolve();
    });
  });
}
