import { existsSync, rmSync } from 'node:fs';
import path from 'node:path';
import { build } from 'esbuild';
import { type Progress } from '../bootstrap/progress.cjs';
import { root } from '../paths';
import { whenChanged } from './source-stamp';

/** What the server is made of: each becomes one file that plain node runs. */
const entries: Record<string, string> = {
  main: 'server/src/main.ts',
  worker: 'server/src/worker.ts',
  migrate: 'server/src/migrate.ts',
  'add-admin': 'server/src/add-admin.ts',
  demo: 'server/src/demo/seed.ts',
  'pdf-worker': 'server/src/pdf-worker.ts',
};

const sources = [
  'server/src',
  'migrations',
  'libs/domain/src',
  'libs/contracts/src',
  'package-lock.json',
  'tsconfig.base.json',
  'infra/build',
];

const output = path.join(root, 'dist/server');

async function bundle(): Promise<void> {
  const present = Object.entries(entries).filter(([, file]) => existsSync(path.join(root, file)));
  rmSync(output, { recursive: true, force: true });
  await build({
    absWorkingDir: root,
    entryPoints: Object.fromEntries(present),
    outdir: output,
    outExtension: { '.js': '.cjs' },
    bundle: true,
    platform: 'node',
    format: 'cjs',
    target: 'node20',
    tsconfig: path.join(root, 'tsconfig.base.json'),
    // Our own code in one file; other people's stay in node_modules, where they are licensed,
    // audited and cached. Node loads the ES modules among them by require since 20.19.
    packages: 'external',
    sourcemap: true,
    logLevel: 'error',
  });
}

export async function buildServer(progress: Progress): Promise<void> {
  await whenChanged(output, sources, () => progress.step('Building the server', bundle));
}
