import { run } from './bootstrap/run.mjs';

await run('bench', { postgres: true, chromium: process.argv[2] === 'lighthouse' });
