import { removeCluster } from './postgres/cluster';
import { Advice, progress, reportAndExit } from './bootstrap/progress.cjs';
import { findChromium } from './bootstrap/programs.cjs';
import { runFilePath } from './stack/run-file';
import { withPrivateStack } from './stack/private-stack';
import { jest, lint, playwright, rooms, types } from './test/steps';
import { exitCode, lastLine, single, sum, type Tally } from './test/tally';
import { shopsNeeded } from '../test/e2e/support/works';
import { startTestCluster } from '../test/support/test-cluster';

type Env = Record<string, string>;

/** One private PostgreSQL for all that jest runs; each spec file gets a database of its own. */
async function withDatabase(work: (env: Env) => Promise<Tally[]>): Promise<Tally[]> {
  const { folder, cluster } = await startTestCluster();
  try {
    return await work({ TEST_DATABASE_ADMIN: cluster.url('postgres', 'postgres') });
  } finally {
    await cluster.stop('immediate');
    await removeCluster(folder);
  }
}

async function browser(more: readonly string[]): Promise<Tally> {
  try {
    return await withPrivateStack({ progress, shops: shopsNeeded }, (stack) =>
      playwright(
        {
          E2E_RUN_FILE: runFilePath(stack.options.dataDir),
          CHROME_PATH: findChromium() ?? '',
        },
        more,
      ),
    );
  } catch (error) {
    progress.say(error instanceof Advice ? error.message : String((error as Error).stack));
    return single(false);
  }
}

async function everything(): Promise<Tally[]> {
  // One lane per core: these three say nothing unless they fail.
  const houseRules = async (): Promise<Tally[]> => [await lint(), await rooms()];
  const [first, second] = await Promise.all([houseRules(), types()]);
  const tested = await withDatabase(async (env) => [
    await jest(['web', 'node', 'checks'], env),
    await jest(['api'], env),
    // The bounded set: `npm run faults` has more and longer ones. The month close under fire waits
    // half of its time for what it killed, so there is a lane more than cores.
    await jest(['faults'], { ...env, FAULTS: 'bounded' }, [], 3),
  ]);
  return [...first, second, ...tested, await browser([])];
}

const parts: Record<string, (more: readonly string[]) => Promise<Tally[]>> = {
  all: everything,
  unit: async (more) => [await jest(['web', 'node', 'checks'], {}, more)],
  api: (more) => withDatabase(async (env) => [await jest(['api'], env, more)]),
  faults: (more) =>
    withDatabase(async (env) => [await jest(['faults'], { ...env, FAULTS: 'full' }, more)]),
  e2e: async (more) => [await browser(more)],
};

/** `npm test`, or a part of it: unit, api, faults, e2e; further arguments go to its tool. */
export async function main([part = 'all', ...more]: readonly string[]): Promise<void> {
  const work = parts[part];
  if (!work) {
    throw new Advice(`There is no part "${part}".`, `Parts: ${Object.keys(parts).join(', ')}`);
  }
  const start = performance.now();
  const total = sum(await work(more).catch(reportAndExit));
  const minutes = ((performance.now() - start) / 60_000).toFixed(1);
  if (total.skipped > 0) {
    progress.say(`\n${total.skipped} skipped. A skipped test proves nothing: the run is not good.`);
  }
  progress.say(`\n${minutes} minutes`);
  progress.say(lastLine(total));
  process.exitCode = exitCode(total);
}
