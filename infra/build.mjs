import { run } from './bootstrap/run.mjs';

await run('build');
