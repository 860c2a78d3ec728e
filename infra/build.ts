import { progress } from './bootstrap/progress.cjs';
import { buildServer } from './build/server';
import { buildWeb } from './build/web';

/** `npm run build`: what a deployment needs, in dist/. Sources that did not change cost nothing. */
export async function main(): Promise<void> {
  await buildServer(progress);
  await buildWeb(progress);
  progress.say('  dist/web and dist/server are up to date.');
}
