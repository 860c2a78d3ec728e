import { run } from './bootstrap/run.mjs';

const part = process.argv[2];
await run('test', { postgres: part !== 'unit', chromium: part === undefined || part === 'e2e' });
