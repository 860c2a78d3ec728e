import { existsSync } from 'node:fs';
import { availableParallelism } from 'node:os';
import { join } from 'node:path';
import { Worker } from 'node:worker_threads';

/** What is sent to a worker thread, and what comes back. */
export interface RenderTask {
  id: number;
  template: string;
  data: unknown;
}
export type RenderResult = { id: number; bytes: Uint8Array } | { id: number; error: string };

interface Waiting {
  resolve(bytes: Buffer): void;
  reject(error: Error): void;
}

interface Lane {
  thread: Worker;
  waiting: Map<number, Waiting>;
}

/** Beside the bundle; absent when the sources run as they are, as in tests. */
const threadFile = join(__dirname, 'pdf-worker.cjs');
const lanes: Lane[] = [];
const mostLanes = Math.max(1, Math.min(2, availableParallelism() - 1));
let nextId = 0;

/**
 * Renders a document in a worker thread, so that the process stays free for its other work. Without
 * the bundled thread it renders here, by the same function.
 */
export function render(
  template: string,
  data: unknown,
  here: (data: never) => Promise<Buffer>,
): Promise<Buffer> {
  if (!existsSync(threadFile)) return here(data as never);
  const lane = quietestLane();
  const id = nextId++;
  return new Promise<Buffer>((resolve, reject) => {
    lane.waiting.set(id, { resolve, reject });
    lane.thread.postMessage({ id, template, data } satisfies RenderTask);
  });
}

function quietestLane(): Lane {
  const quietest = [...lanes].sort((a, b) => a.waiting.size - b.waiting.size)[0];
  if (quietest && (quietest.waiting.size === 0 || lanes.length >= mostLanes)) return quietest;
  return openLane();
}

function openLane(): Lane {
  const thread = new Worker(threadFile, { resourceLimits: { maxOldGenerationSizeMb: 160 } });
  const lane: Lane = { thread, waiting: new Map() };
  thread.on('message', (result: RenderResult) => {
    const waiting = lane.waiting.get(result.id);
    lane.waiting.delete(result.id);
    if ('error' in result) waiting?.reject(new Error(result.error));
    else waiting?.resolve(Buffer.from(result.bytes));
  });
  const gone = (why: Error) => {
    const at = lanes.indexOf(lane);
    if (at >= 0) lanes.splice(at, 1);
    for (const waiting of lane.waiting.values()) waiting.reject(why);
    lane.waiting.clear();
  };
  thread.on('error', gone);
  thread.on('exit', () => gone(new Error('The thread that renders documents ended')));
  // After the listeners, which each hold the process again: an idle thread must not keep it alive.
  thread.unref();
  lanes.push(lane);
  return lane;
}
