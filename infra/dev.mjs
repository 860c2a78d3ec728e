import { run } from './bootstrap/run.mjs';

await run('dev', { postgres: !process.env.DATABASE_URL });
