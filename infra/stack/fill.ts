import { existsSync } from 'node:fs';
import path from 'node:path';
import { Advice, type Progress } from '../bootstrap/progress.cjs';
import { quietRun } from '../bootstrap/quiet-run.cjs';
import { root } from '../paths';
import { type DatabaseUrls, withClient } from '../postgres/databases';
import { readState, writeState } from '../process/state-file';
import { accountsPath } from './run-file';

type Env = Record<string, string>;

function serverProgram(name: string): string {
  return path.join(root, 'dist/server', `${name}.cjs`);
}

export async function migrate(env: Env, signal?: AbortSignal): Promise<void> {
  await quietRun(process.execPath, [serverProgram('migrate')], { cwd: root, env, signal });
}

/** Runs the demo's seed with its own arguments; it writes the accounts one can sign in with. */
export async function seed(
  dataDir: string,
  env: Env,
  args: readonly string[] = [],
  signal?: AbortSignal,
): Promise<string> {
  return quietRun(process.execPath, [serverProgram('demo'), ...args], {
    cwd: root,
    env: { ...env, DEMO_ACCOUNTS_FILE: accountsPath(dataDir) },
    signal,
  });
}

/** Asked as the role that serves the platform: row security hides shops from their owner role. */
async function hasShops(platformUrl: string): Promise<boolean> {
  return withClient(platformUrl, async (client) => {
    const { rows } = await client.query<{ some: boolean }>(
      'SELECT EXISTS (SELECT FROM shops) AS some',
    );
    return rows[0]?.some ?? false;
  });
}

interface Filling {
  dataDir: string;
  urls: DatabaseUrls;
  env: Env;
  progress: Progress;
  signal: AbortSignal;
  /** Makes the database new; absent for a given one, which is not ours to empty. */
  recreate?: () => Promise<void>;
}

/** Fills an empty database, and only that; a filling that was cut short begins anew. */
export async function fillDemo(filling: Filling): Promise<void> {
  const { dataDir, urls, env, progress, signal, recreate } = filling;
  if (!existsSync(serverProgram('demo')) || process.env.DEMO === 'no') return;
  const marker = path.join(dataDir, 'demo.json');
  const cutShort = readState<{ state: string }>(marker)?.state === 'filling';
  if (cutShort) {
    if (!recreate) {
      throw new Advice(
        'Filling the demo was cut short, and the database of DATABASE_URL is half filled.',
        `Empty that database and start again; or, to keep it as it is, delete ${marker}.`,
      );
    }
    await progress.step('Clearing a demo that was left half filled', async () => {
      await recreate();
      await migrate(env, signal);
    });
  } else if (await hasShops(urls.platformUrl)) {
    return;
  }
  await progress.step('Filling the demo (once)', async () => {
    writeState(marker, { state: 'filling' });
    await seed(dataDir, env, [], signal);
    writeState(marker, { state: 'filled' });
  });
}
