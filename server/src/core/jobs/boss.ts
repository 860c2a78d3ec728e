import PgBoss from 'pg-boss';
import { platformDb } from '../database/database';
import { tenantTransaction } from '../database/tenancy';
import { type Log } from '../logging';
import { queues, type QueueName } from './queues';

let boss: PgBoss | undefined;

/** Connects this process to the job queues; only the worker also `schedules` and supervises. */
export async function openJobs(options: {
  url: string;
  log: Log;
  worker: boolean;
}): Promise<PgBoss> {
  const opened = new PgBoss({
    connectionString: options.url,
    migrate: false,
    supervise: options.worker,
    schedule: options.worker,
    max: options.worker ? 8 : 2,
    application_name: 'tumblewright-jobs',
  });
  opened.on('error', (error) => options.log.error({ err: error }, 'job queue'));
  await opened.start();
  boss = opened;
  return opened;
}

export function jobs(): PgBoss {
  if (!boss) throw new Error('The job queues are not open: call openJobs first.');
  return boss;
}

export async function closeJobs(): Promise<void> {
  await boss?.stop({ graceful: true, timeout: 5_000, wait: true }).catch(() => undefined);
  boss = undefined;
}

interface SendOptions {
  /** While a job with this key waits, another is not added. */
  singletonKey?: string;
  startAfterSeconds?: number;
}

/** Wakes a queue in the open tenant transaction: the job exists only when the data does. */
export async function enqueue(
  queue: QueueName,
  data: Record<string, unknown>,
  options: SendOptions = {},
): Promise<void> {
  const transaction = tenantTransaction() as unknown as {
    connection: { query(text: string, values: unknown[]): Promise<{ rows: unknown[] }> };
  };
  await jobs().send(queue, data, {
    ...sendOptions(queue, options),
    db: { executeSql: (text, values) => transaction.connection.query(text, values) },
  });
}

/** Wakes a queue from the platform side, or outside any transaction. */
export async function enqueueNow(
  queue: QueueName,
  data: Record<string, unknown>,
  options: SendOptions = {},
): Promise<void> {
  const open = platformDb().open.getStore() as unknown as
    | { connection: { query(text: string, values: unknown[]): Promise<{ rows: unknown[] }> } }
    | undefined;
  await jobs().send(queue, data, {
    ...sendOptions(queue, options),
    ...(open
      ? {
          db: {
            executeSql: (text: string, values: unknown[]) => open.connection.query(text, values),
          },
        }
      : {}),
  });
}

function sendOptions(queue: QueueName, options: SendOptions): PgBoss.SendOptions {
  return {
    ...queues[queue],
    ...(options.singletonKey ? { singletonKey: options.singletonKey } : {}),
    ...(options.startAfterSeconds ? { startAfter: options.startAfterSeconds } : {}),
  };
}
