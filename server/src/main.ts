import { createServer } from 'node:http';
import { createApp } from './app';
import { readConfig } from './core/config';
import { createLog } from './core/logging';
import { listenForChanges } from './core/live/live';
import { closeOnSignal, openServices } from './core/process';

/** The web process: answers the API and serves the web application. */
async function main(): Promise<void> {
  const config = readConfig();
  const log = createLog(config.logLevel, 'web');
  const closeServices = await openServices(config, log, 'web');
  const live = listenForChanges(config.database.directUrl, log);
  const server = createServer(
    { requestTimeout: 60_000, headersTimeout: 15_000 },
    createApp(config, log),
  );
  await new Promise<void>((resolve, reject) => {
    server.once('error', reject);
    server.listen(config.port, config.host, resolve);
  });
  log.info({ address: server.address() }, 'web process ready');
  closeOnSignal(log, async () => {
    server.close();
    server.closeAllConnections();
    await live.close();
    await closeServices();
  });
}

main().catch((error: unknown) => {
  process.stderr.write(`${error instanceof Error ? error.stack : String(error)}\n`);
  process.exit(1);
});
