import path from 'node:path';
import { type Progress } from '../bootstrap/progress.cjs';
import { quietRun } from '../bootstrap/quiet-run.cjs';
import { root } from '../paths';
import { precompress } from './compress';
import { whenChanged } from './source-stamp';

const sources = [
  'apps/web',
  'libs',
  'angular.json',
  'package-lock.json',
  'tsconfig.base.json',
  'infra/build',
];

const webOutput = path.join(root, 'dist/web');

/** The Angular command line, run by the node that runs us. */
export const angularCli = path.join(root, 'node_modules/@angular/cli/bin/ng.js');

async function build(): Promise<void> {
  await quietRun(process.execPath, [angularCli, 'build', '--configuration', 'production'], {
    cwd: root,
    // Pieces that are always loaded together become one: fewer requests, and better compressed.
    env: { ...process.env, NG_CLI_ANALYTICS: 'false', CI: '1', NG_BUILD_OPTIMIZE_CHUNKS: '1' },
  });
  await precompress(webOutput);
}

export async function buildWeb(progress: Progress): Promise<void> {
  await whenChanged(webOutput, sources, () =>
    progress.step('Building the web application (half a minute, the first time)', build),
  );
}
