import { Advice, progress } from './bootstrap/progress.cjs';
import { buildServer } from './build/server';
import { dataFolder, wantedPort } from './paths';
import { checkArguments } from './stack/demo-arguments';
import { endLeftOvers, runningStart } from './stack/run-file';
import { seed } from './stack/fill';
import { Stack } from './stack/stack';

/**
 * `npm run demo -- --shops 200`: passes its arguments to the demo's seed, which adds to what is
 * there. With the application running it works on that one's database; else it starts it for this.
 */
export async function main(args: readonly string[]): Promise<void> {
  checkArguments(args);
  const dataDir = dataFolder();
  await buildServer(progress);
  if (runningStart(dataDir) !== undefined) {
    throw new Advice(
      'Tumblewright is running.',
      'Stop it with Ctrl-C, then run this again: the seed writes past the running processes.',
    );
  }
  await endLeftOvers(dataDir);
  const stack = new Stack({ dataDir, progress, demo: true, durable: true, port: wantedPort() });
  try {
    const env = await stack.startWithoutServices();
    const said = await progress.step(`Growing the demo (${args.join(' ') || 'as it is'})`, () =>
      seed(dataDir, env, args),
    );
    if (said.trim()) progress.say(said.trim());
  } finally {
    await stack.stop();
  }
}
