import { run } from './bootstrap/run.mjs';

await run('start', { postgres: !process.env.DATABASE_URL });
