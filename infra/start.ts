import { progress } from './bootstrap/progress.cjs';
import { buildServer } from './build/server';
import { buildWeb } from './build/web';
import { dataFolder, wantedPort } from './paths';
import { greeting } from './stack/greeting';
import { runAtKeyboard } from './stack/session';
import { Stack } from './stack/stack';

/** `npm start`: the whole application from a fresh clone, or quickly again. */
export async function main(): Promise<void> {
  const dataDir = dataFolder();
  const stack = new Stack({
    dataDir,
    progress,
    demo: true,
    durable: true,
    port: wantedPort(),
    notice: (words) => progress.say(words),
  });
  await runAtKeyboard(stack, async () => {
    await buildServer(progress);
    await buildWeb(progress);
    await stack.start();
    progress.say(greeting(stack.runFile(), dataDir));
  });
}
