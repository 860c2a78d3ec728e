import { EventEmitter } from 'node:events';
import { type LiveKind } from '@lib/contracts';
import pg from 'pg';
import { type Response } from 'express';
import { type Context } from '../context';
import { write } from '../database/tenancy';
import { type Log } from '../logging';

/** What changed, in words the browser knows; ids only, the browser asks again for the rest. */
export interface LiveEvent {
  shopId: string;
  clientId: string | null;
  kind: LiveKind;
  id: string | null;
}

const channel = 'tumblewright_live';
const changes = new EventEmitter().setMaxListeners(0);

/** Tells everyone who follows the shop, when the open transaction commits. */
export function announce(
  context: Pick<Context, 'shopId'>,
  kind: LiveKind,
  id: string | null,
  clientId: string | null = null,
): Promise<void> {
  return announceAll(context, kind, [{ id, clientId }]);
}

/** The same of many things of a kind, with one statement. */
export async function announceAll(
  context: Pick<Context, 'shopId'>,
  kind: LiveKind,
  changed: readonly Pick<LiveEvent, 'id' | 'clientId'>[],
): Promise<void> {
  const events = changed.map(({ id, clientId }): string =>
    JSON.stringify({ shopId: context.shopId, clientId, kind, id } satisfies LiveEvent),
  );
  await write('select pg_notify($channel, event) from unnest($events::text[]) as e (event)', {
    channel,
    events,
  });
}

/** Listens on a connection of its own, and connects again when it breaks. */
export function listenForChanges(url: string, log: Log): { close(): Promise<void> } {
  let client: pg.Client | undefined;
  let closed = false;
  const start = async (): Promise<void> => {
    const next = new pg.Client({ connectionString: url, application_name: 'tumblewright-live' });
    const again = () => {
      if (client !== next || closed) return;
      client = undefined;
      setTimeout(() => void start().catch(again), 1000).unref();
    };
    client = next;
    next.on('error', again);
    next.on('end', again);
    next.on('notification', ({ payload }) => {
      if (payload) changes.emit('change', JSON.parse(payload) as LiveEvent);
    });
    try {
      await next.connect();
      await next.query(`listen ${channel}`);
    } catch (error) {
      log.warn({ err: error }, 'live updates: cannot listen, trying again');
      again();
    }
  };
  void start();
  return {
    close: async () => {
      closed = true;
      await client?.end().catch(() => undefined);
    },
  };
}

/** After so long a stream ends and the browser asks again, so that its right is looked at anew. */
const longestStream = 10 * 60_000;

/** Keeps an answer open and writes each change the person may know of (Server-Sent Events). */
export function followChanges(context: Context, response: Response): void {
  response.status(200).set({
    'Content-Type': 'text/event-stream',
    'Cache-Control': 'no-store',
    'X-Accel-Buffering': 'no',
  });
  response.write('retry: 2000\n: following\n\n');
  const onChange = (event: LiveEvent) => {
    if (event.shopId !== context.shopId) return;
    if (context.clientId && event.clientId !== context.clientId) return;
    // An attendant knows one store of the client: what changed in which other is not told.
    const id = context.storeId ? null : event.id;
    response.write(`event: ${event.kind}\ndata: ${JSON.stringify({ kind: event.kind, id })}\n\n`);
  };
  const beat = setInterval(() => response.write(': still here\n\n'), 20_000);
  const end = setTimeout(() => response.end(), longestStream).unref();
  changes.on('change', onChange);
  response.on('close', () => {
    clearInterval(beat);
    clearTimeout(end);
    changes.off('change', onChange);
  });
}
