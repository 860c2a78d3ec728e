import { run } from './bootstrap/run.mjs';

await run('pictures', { postgres: true, chromium: true });
