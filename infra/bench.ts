import { existsSync, readdirSync, writeFileSync } from 'node:fs';
import { createRequire } from 'node:module';
import os from 'node:os';
import path from 'node:path';
import { Advice, progress } from './bootstrap/progress.cjs';
import { type BenchFile } from './bench/bench-contract';
import { root } from './paths';
import { withPrivateStack } from './stack/private-stack';

const folder = path.join(root, 'test/bench');

function benchNames(): string[] {
  if (!existsSync(folder)) return [];
  return readdirSync(folder)
    .filter((name) => name.endsWith('.bench.ts'))
    .map((name) => name.replace('.bench.ts', ''));
}

function takeJson(args: readonly string[]): { jsonFile?: string; rest: string[] } {
  const at = args.indexOf('--json');
  if (at < 0) return { rest: [...args] };
  const jsonFile = args[at + 1];
  if (!jsonFile) throw new Advice('--json needs the name of a file.');
  return { jsonFile, rest: args.filter((_, index) => index !== at && index !== at + 1) };
}

/** `npm run bench -- NAME [--json FILE]`: measures on a private stack, durable as in earnest. */
export async function main(args: readonly string[]): Promise<void> {
  const { jsonFile, rest } = takeJson(args);
  const [name = '', ...more] = rest;
  if (!benchNames().includes(name)) {
    throw new Advice(
      name ? `There is no bench "${name}".` : 'Which bench?',
      `npm run bench -- NAME [--json FILE], with NAME one of: ${benchNames().join(', ')}`,
    );
  }
  const file = path.join(folder, `${name}.bench.ts`);
  // tsx teaches `require` TypeScript; a native import() would not know the ending.
  const { bench, needsWeb } = createRequire(__filename)(file) as BenchFile;
  const result = await withPrivateStack(
    { progress, durable: true, ...(needsWeb ? {} : { webDir: path.join(root, 'dist/web') }) },
    (stack) => bench({ stack, args: more, say: (text) => progress.say(text) }),
  );
  console.table(result.rows);
  progress.say(result.met ? 'Targets met.' : 'Targets not met.');
  if (jsonFile) {
    const machine = { node: process.version, cpus: os.cpus().length, cpu: os.cpus()[0]?.model };
    writeFileSync(jsonFile, `${JSON.stringify({ name, machine, ...result }, null, 2)}\n`);
    progress.say(`Written to ${jsonFile}`);
  }
  process.exitCode = result.met ? 0 : 1;
}
