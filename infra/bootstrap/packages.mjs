// node_modules as package-lock.json has it: installed when absent, repeated when the lock has changed.

import { createHash } from 'node:crypto';
import { accessSync, constants, existsSync, readFileSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import progressModule from './progress.cjs';
import quietRunModule from './quiet-run.cjs';

const { Advice, progress } = progressModule;
const { quietRun } = quietRunModule;

const readJson = (file) => JSON.parse(readFileSync(file, 'utf8'));

/** Everything the lock wants is there in that version (optional packages of other systems aside). */
function installedMatchesLock(root) {
  const installedFile = path.join(root, 'node_modules/.package-lock.json');
  if (!existsSync(installedFile)) return false;
  const wanted = readJson(path.join(root, 'package-lock.json')).packages;
  const installed = readJson(installedFile).packages;
  return Object.entries(wanted).every(([folder, entry]) => {
    if (folder === '' || entry.link) return true;
    const found = installed[folder];
    return found ? found.version === entry.version : entry.optional || entry.devOptional;
  });
}

function refuseUnlessWritable(root) {
  const folder = [path.join(root, 'node_modules'), root].find(existsSync);
  try {
    accessSync(folder, constants.W_OK);
  } catch {
    throw new Advice(
      `The packages must be installed, and you may not write to ${folder}.`,
      'Run the command as the user it belongs to, or give it to yourself (chown -R).',
    );
  }
}

export async function ensurePackages(root) {
  const lock = readFileSync(path.join(root, 'package-lock.json'));
  const key = createHash('sha256')
    .update(lock)
    .update(process.versions.modules + process.platform + process.arch)
    .digest('hex');
  const stamp = path.join(root, 'node_modules/.tumblewright-stamp');
  if (existsSync(stamp) && readFileSync(stamp, 'utf8') === key) return;

  if (!installedMatchesLock(root)) {
    refuseUnlessWritable(root);
    const npm = process.env.npm_execpath;
    const viaNode = npm && npm.endsWith('npm-cli.js');
    const args = ['ci', '--include=dev', '--no-audit', '--no-fund'];
    await progress.step('Installing the packages (a minute or two, the first time)', () =>
      quietRun(viaNode ? process.execPath : 'npm', viaNode ? [npm, ...args] : args, {
        cwd: root,
        todo: 'Check that the npm registry can be reached, then run the command again.',
      }),
    );
  }
  try {
    writeFileSync(stamp, key);
  } catch {
    // Packages that somebody else installed for us: they are right, only looked through each time.
  }
}
