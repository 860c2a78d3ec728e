import { run } from './bootstrap/run.mjs';

await run('demo', { postgres: !process.env.DATABASE_URL });
