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
  const { connection } = tenantTransaction() as unknown as Transacting;
  await send(queue, data, options, connection);
}

/** Wakes a queue from the platform side, or outside any transaction. */
export async function enqueueNow(
  queue: QueueName,
  data: Record<string, unknown>,
  options: SendOptions = {},
): Promise<void> {
  const open = platformDb().open.getStore() as unknown as Transacting | undefined;
  await send(queue, data, options, open?.connection);
}

interface Connection {
  query(text: string, values: unknown[]): Promise<{ rows: unknown[] }>;
}

interface Transacting {
  connection: Connection;
}

/** Through the connection of the open transaction, or by the queues' own. */
async function send(
  queue: QueueName,
  data: Record<string, unknown>,
  options: SendOptions,
  connection: Connection | undefined,
): Promise<void> {
  const { singletonKey, startAfterSeconds } = options;
  const db = connection
    ? { executeSql: (text: string, values: unknown[]) => connection.query(text, values) }
    : undefined;
  if (singletonKey && (await waits(queue, singletonKey, db ?? jobs().getDb()))) return;
  await jobs().send(queue, data, {
    ...queues[queue],
    ...(singletonKey ? { singletonKey } : {}),
    ...(startAfterSeconds ? { startAfter: startAfterSeconds } : {}),
    ...(db ? { db } : {}),
  });
}

/**
 * pg-boss itself looks at a job's key only in queues where every job has one. Two who ask at once may
 * both add a job: it does harm to nobody, unlike one more each minute while a worker is slow.
 */
async function waits(queue: QueueName, key: string, db: PgBoss.Db): Promise<boolean> {
  const { rows } = (await db.executeSql(
    `select 1 from pgboss.job where name = $1 and state < 'active' and singleton_key = $2 limit 1`,
    [queue, key],
  )) as { rows: unknown[] };
  return rows.length > 0;
}
