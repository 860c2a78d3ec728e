import { run } from './bootstrap/run.mjs';

await run('bench', { postgres: true });
