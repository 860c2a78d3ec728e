// Every command of package.json begins here: a bare machine has Node.js and npm, and nothing else.
// Then the driver proper, in TypeScript, is loaded by the tsx that has just been installed.

import { createRequire } from 'node:module';
import path from 'node:path';
import { fileURLToPath } from 'node:url';
import { ensureChromium, ensurePostgres } from './debian.mjs';
import { ensurePackages } from './packages.mjs';
import progressModule from './progress.cjs';

const { Advice, reportAndExit } = progressModule;

export const root = path.resolve(path.dirname(fileURLToPath(import.meta.url)), '../..');

function checkNode() {
  const [major = 0, minor = 0] = process.versions.node.split('.').map(Number);
  if (major > 20 || (major === 20 && minor >= 19)) return;
  throw new Advice(
    `Node.js ${process.versions.node} is too old for Tumblewright.`,
    'Install Node.js 20.19 or newer (of the 20 series), then run the command again.',
  );
}

/** By default a signal ends us without a word to the programs we started; a driver may know better. */
function leaveOn(signal, code) {
  process.once(signal, () => {
    if (process.listenerCount(signal) === 0) process.exit(code);
  });
}

/** Makes ready what `needs` names, then runs the driver `infra/<driver>.ts`. */
export async function run(driver, needs = {}) {
  try {
    checkNode();
    leaveOn('SIGINT', 130);
    leaveOn('SIGTERM', 143);
    process.chdir(root);
    await ensurePackages(root);
    if (needs.postgres) await ensurePostgres();
    if (needs.chromium) await ensureChromium();
    const require = createRequire(import.meta.url);
    require('tsx/cjs/api').register();
    const { main } = require(path.join(root, 'infra', `${driver}.ts`));
    await main(process.argv.slice(2));
  } catch (error) {
    reportAndExit(error);
  }
}
