import { type Config, useConfig } from './config';
import { whenDatabaseAnswers } from './database/away';
import { closeDatabase, openDatabase } from './database/database';
import { diskFileStore, useFileStore } from './files/file-store';
import { closeJobs, openJobs } from './jobs/boss';
import { type Log } from './logging';
import { openStripe } from './payments/stripe';

/** What every process opens before it works, and closes in reverse. */
export async function openServices(config: Config, log: Log, kind: 'web' | 'worker') {
  useConfig(config);
  openDatabase({ ...config.database });
  useFileStore(diskFileStore(config.filesDir));
  openStripe(config.card);
  await whenDatabaseAnswers(log, () =>
    openJobs({ url: config.database.directUrl, log, worker: kind === 'worker' }),
  );
  return async () => {
    await closeJobs();
    await closeDatabase();
  };
}

/** Runs `close` once on SIGTERM or SIGINT, and leaves within ten seconds whatever happens. */
export function closeOnSignal(log: Log, close: () => Promise<void>): void {
  let closing = false;
  const leave = (signal: string) => {
    if (closing) return;
    closing = true;
    log.info({ signal }, 'closing');
    setTimeout(() => process.exit(1), 10_000).unref();
    void close().then(
      () => process.exit(0),
      (error: unknown) => {
        log.error({ err: error }, 'closing failed');
        process.exit(1);
      },
    );
  };
  process.on('SIGTERM', leave);
  process.on('SIGINT', leave);
}
