import { spawn } from 'node:child_process';
import { existsSync, mkdirSync, readdirSync, rmSync } from 'node:fs';
import path from 'node:path';
import { progress } from '../bootstrap/progress.cjs';
import { quietRun } from '../bootstrap/quiet-run.cjs';
import { root } from '../paths';
import { nothing, ofJest, ofPlaywright, readResult, single, type Tally } from './tally';

type Env = Record<string, string>;

const results = path.join(root, 'node_modules/.cache/tumblewright-test');

function bin(file: string): string {
  return path.join(root, 'node_modules', file);
}

/** Runs a tool of node_modules with its output shown; true when it ended well. */
function shown(file: string, args: readonly string[], env: Env): Promise<boolean> {
  return new Promise((resolve) => {
    const child = spawn(process.execPath, [bin(file), ...args], {
      cwd: root,
      stdio: 'inherit',
      env: { ...process.env, ...env },
    });
    child.on('error', () => resolve(false));
    child.on('close', (code) => resolve(code === 0));
  });
}

/** A check that says nothing unless it fails. */
async function check(title: string, commands: readonly (readonly string[])[]): Promise<Tally> {
  const start = performance.now();
  try {
    for (const [file = '', ...args] of commands) {
      await quietRun(process.execPath, [bin(file), ...args], { cwd: root });
    }
    progress.say(`  ${title}: in order (${((performance.now() - start) / 1000).toFixed(1)} s)`);
    return single(true);
  } catch (error) {
    progress.say(`  ${title}: failed\n${(error as Error).message}`);
    return single(false);
  }
}

export function lint(): Promise<Tally> {
  const cache = ['--cache', '--cache-location', 'node_modules/.cache/eslint/'];
  return check('Lint and format', [
    ['eslint/bin/eslint.js', '.', '--max-warnings', '0', ...cache],
    ['prettier/bin/prettier.cjs', '--check', '.', '--cache', '--log-level', 'warn'],
  ]);
}

export function types(): Promise<Tally> {
  const tsc = (project: string, memory: string) => {
    const file = `node_modules/.cache/${memory}.json`;
    return ['typescript/bin/tsc', '-p', project, '--incremental', '--tsBuildInfoFile', file];
  };
  return check('Types', [
    tsc('tsconfig.node.json', 'tsc-node'),
    tsc('apps/web/tsconfig.types.json', 'tsc-web-specs'),
    [
      '@angular/compiler-cli/bundles/src/bin/ngc.js',
      '-p',
      'apps/web/tsconfig.app.json',
      '--noEmit',
    ],
  ]);
}

export function rooms(): Promise<Tally> {
  const config = ['--config', '.dependency-cruiser.cjs'];
  return check('Rooms', [
    ['dependency-cruiser/bin/dependency-cruise.mjs', ...config, 'apps', 'libs', 'server/src'],
  ]);
}

export async function jest(
  projects: readonly string[],
  env: Env,
  more: readonly string[] = [],
  lanes = 2,
): Promise<Tally> {
  progress.say(`\nTests of ${projects.join(', ')}`);
  mkdirSync(results, { recursive: true });
  const file = path.join(results, `jest-${projects.join('-')}.json`);
  rmSync(file, { force: true });
  const args = [
    '--selectProjects',
    ...projects,
    '--ci',
    `--maxWorkers=${lanes}`,
    '--passWithNoTests',
    '--json',
    `--outputFile=${file}`,
    ...more,
  ];
  // With --json, jest writes the result to its output too; what people read is on the other one.
  const ended = await shownWithoutOutput('jest/bin/jest.js', args, env);
  const result = readResult<Parameters<typeof ofJest>[0]>(file);
  return result ? ofJest(result, ended) : single(false);
}

function shownWithoutOutput(file: string, args: readonly string[], env: Env): Promise<boolean> {
  return new Promise((resolve) => {
    const child = spawn(process.execPath, [bin(file), ...args], {
      cwd: root,
      stdio: ['ignore', 'ignore', 'inherit'],
      env: { ...process.env, ...env },
    });
    child.on('error', () => resolve(false));
    child.on('close', (code) => resolve(code === 0));
  });
}

function hasSpecs(folder: string): boolean {
  if (!existsSync(folder)) return false;
  return readdirSync(folder, { recursive: true }).some((name) => String(name).endsWith('.spec.ts'));
}

export async function playwright(env: Env, more: readonly string[] = []): Promise<Tally> {
  if (!hasSpecs(path.join(root, 'test/e2e'))) {
    progress.say('\nThere are no browser tests.');
    return nothing;
  }
  progress.say('\nBrowser tests');
  mkdirSync(results, { recursive: true });
  const file = path.join(results, 'playwright.json');
  rmSync(file, { force: true });
  const args = ['test', '--config', 'test/e2e/playwright.config.ts', '--reporter=list,json'];
  const ended = await shown('@playwright/test/cli.js', [...args, ...more], {
    ...env,
    PLAYWRIGHT_JSON_OUTPUT_NAME: file,
  });
  const result = readResult<Parameters<typeof ofPlaywright>[0]>(file);
  return result ? ofPlaywright(result, ended) : single(false);
}
