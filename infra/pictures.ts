import { spawn } from 'node:child_process';
import path from 'node:path';
import { Advice, progress } from './bootstrap/progress.cjs';
import { findChromium } from './bootstrap/programs.cjs';
import { root } from './paths';
import { withPrivateStack } from './stack/private-stack';
import { runFilePath } from './stack/run-file';

/** `npm run pictures`: the screenshots of docs/pictures, made from a fresh demo. */
export async function main(args: readonly string[]): Promise<void> {
  const script = path.join(root, 'test/e2e/pictures.ts');
  const code = await withPrivateStack({ progress }, (stack) => {
    const env = {
      ...process.env,
      E2E_RUN_FILE: runFilePath(stack.options.dataDir),
      CHROME_PATH: findChromium(),
    };
    const child = spawn(
      process.execPath,
      [path.join(root, 'node_modules/tsx/dist/cli.mjs'), script, ...args],
      { cwd: root, stdio: 'inherit', env },
    );
    return new Promise<number | null>((resolve) => child.on('close', resolve));
  });
  if (code !== 0) throw new Advice('Not all pictures could be made; the lines above say why.');
}
