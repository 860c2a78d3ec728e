import { createServer } from 'node:http';
import express from 'express';
import { readConfig } from './core/config';
import { whenDatabaseAnswers } from './core/database/away';
import { health } from './core/http/health';
import { serveMetrics } from './core/http/metrics';
import { jobs } from './core/jobs/boss';
import { startWork } from './core/jobs/work';
import { createLog } from './core/logging';
import { closeOnSignal, openServices } from './core/process';
import { jobHandlers } from './jobs';

/** The worker process: works the job queues and wakes the sweep every minute. */
async function main(): Promise<void> {
  const config = readConfig();
  const log = createLog(config.logLevel, 'worker');
  const closeServices = await openServices(config, log, 'worker');
  const app = express();
  app.use(health());
  app.get('/metrics', serveMetrics());
  const server = createServer(app).listen(config.workerPort, config.host);
  await whenDatabaseAnswers(log, () => jobs().schedule('sweep', '* * * * *', {}));
  await startWork(jobHandlers, { config, log });
  // Whatever fell due while no worker ran is found now, not in up to a minute.
  await whenDatabaseAnswers(log, () => jobs().send('sweep', {}, { singletonKey: 'sweep' }));
  log.info('worker ready');
  closeOnSignal(log, async () => {
    server.close();
    await closeServices();
  });
}

// pg-boss reports a job's end in the background; when the database is gone at that moment the job is
// simply worked again, so the process must not end over it.
process.on('unhandledRejection', (reason) => {
  process.stderr.write(
    `${JSON.stringify({ level: 40, msg: 'unhandled', reason: String(reason) })}\n`,
  );
});

main().catch((error: unknown) => {
  process.stderr.write(`${error instanceof Error ? error.stack : String(error)}\n`);
  process.exit(1);
});
