import { existsSync, readFileSync } from 'node:fs';
import path from 'node:path';
import { type RunFile } from '../../../infra/stack/run-file';

const file = path.resolve(
  path.join(__dirname, '../../..'),
  process.env.E2E_RUN_FILE || '.data/run.json',
);

/** Where the started application is. */
export const run: RunFile = readRun();

function readRun(): RunFile {
  if (!existsSync(file)) {
    throw new Error(`Nothing runs: there is no ${file}. Start with npm run test:e2e.`);
  }
  return JSON.parse(readFileSync(file, 'utf8')) as RunFile;
}
