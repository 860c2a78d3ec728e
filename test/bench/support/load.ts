import { Agent, request } from 'node:http';

export interface Shot {
  method: string;
  path: string;
  headers: Record<string, string>;
  body?: string;
}

interface LoadResult {
  perSecond: number;
  p50: number;
  p95: number;
  failed: number;
}

/** Fires `total` requests at one server, `connections` at a time, and measures each. */
export async function load(
  base: string,
  shot: (n: number) => Shot,
  options: { connections: number; total: number },
): Promise<LoadResult> {
  const agent = new Agent({ keepAlive: true, maxSockets: options.connections });
  const times: number[] = [];
  let next = 0;
  let failed = 0;
  const url = new URL(base);
  const once = (n: number): Promise<void> =>
    new Promise((resolve, reject) => {
      const { method, path, headers, body } = shot(n);
      const start = performance.now();
      const sent = request(
        { host: url.hostname, port: url.port, agent, method, path, headers },
        (answer) => {
          if ((answer.statusCode ?? 500) >= 400) failed++;
          answer.resume();
          answer.on('end', () => {
            times.push(performance.now() - start);
            resolve();
          });
        },
      );
      sent.on('error', reject);
      sent.end(body);
    });
  const begun = performance.now();
  await Promise.all(
    Array.from({ length: options.connections }, async () => {
      while (next < options.total) await once(next++);
    }),
  );
  const seconds = (performance.now() - begun) / 1000;
  agent.destroy();
  times.sort((a, b) => a - b);
  const at = (share: number) =>
    times[Math.min(times.length - 1, Math.floor(times.length * share))] ?? 0;
  return { perSecond: options.total / seconds, p50: at(0.5), p95: at(0.95), failed };
}
