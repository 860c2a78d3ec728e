import { chmodSync, mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { type Progress } from '../bootstrap/progress.cjs';
import { buildServer } from '../build/server';
import { buildWeb } from '../build/web';
import { removeCluster } from '../postgres/cluster';
import { anyPort } from '../process/ports';
import { Stack, type StackOptions } from './stack';

/** What tests need more of than people do; the limits themselves have tests of their own. */
const withoutLimits = { RATE_LIMIT: '0', SIGN_IN_RATE_LIMIT: '0', LOG_LEVEL: 'warn' };

/**
 * Builds and starts the whole application in a folder of its own, works with it, and leaves
 * nothing behind. Its addresses are in `run.json` of that folder.
 */
export async function withPrivateStack<T>(
  options: { progress: Progress } & Partial<StackOptions>,
  work: (stack: Stack) => Promise<T>,
): Promise<T> {
  await buildServer(options.progress);
  if (options.webDir === undefined) await buildWeb(options.progress);
  const dataDir = mkdtempSync(path.join(tmpdir(), 'tumblewright-stack-'));
  // As root, PostgreSQL runs as a lent user, who must be able to pass through.
  chmodSync(dataDir, 0o711);
  const stack = new Stack({
    demo: true,
    durable: false,
    port: await anyPort(),
    ...options,
    dataDir,
    env: { ...withoutLimits, ...options.env },
  });
  const interrupted = (): void => {
    stack.forceStop();
    process.exit(130);
  };
  process.once('SIGINT', interrupted);
  process.once('SIGTERM', interrupted);
  try {
    await stack.start();
    return await work(stack);
  } finally {
    await stack.stop();
    await removeCluster(path.join(dataDir, 'postgres'));
    rmSync(dataDir, { recursive: true, force: true });
    process.off('SIGINT', interrupted);
    process.off('SIGTERM', interrupted);
  }
}
