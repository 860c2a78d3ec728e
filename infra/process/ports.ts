import { randomInt } from 'node:crypto';
import { createServer } from 'node:net';

/** True when this loopback port can be listened on now. */
export function portIsFree(port: number): Promise<boolean> {
  return new Promise((resolve) => {
    const probe = createServer();
    probe.once('error', () => resolve(false));
    probe.listen({ port, host: '127.0.0.1', exclusive: true }, () =>
      probe.close(() => resolve(true)),
    );
  });
}

/** The wanted port, or the next free one after it. */
export async function portFrom(wanted: number, taken: readonly number[] = []): Promise<number> {
  const last = Math.min(wanted + 200, 65_535);
  for (let port = wanted; port <= last; port += 1) {
    if (!taken.includes(port) && (await portIsFree(port))) return port;
  }
  throw new Error(`No free port between ${wanted} and ${last}.`);
}

/** Any free port below the range from which the system takes ports for outgoing connections. */
export async function anyPort(): Promise<number> {
  for (let attempt = 0; attempt < 200; attempt += 1) {
    const port = randomInt(20_000, 32_000);
    if (await portIsFree(port)) return port;
  }
  throw new Error('No free port found between 20000 and 32000.');
}
