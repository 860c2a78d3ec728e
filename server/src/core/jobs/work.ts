import { type Config } from '../config';
import { type Log } from '../logging';
import { jobs } from './boss';
import { type QueueName } from './queues';

/** What the worker does for one queue. `work` may throw: the queue tries again later. */
export interface Job<Data extends object = Record<string, unknown>> {
  queue: QueueName;
  /** How many at once in one process; default 1. */
  atOnce?: number;
  work(data: Data, services: { config: Config; log: Log }): Promise<void>;
}

/** Starts handing the queues' jobs to their handlers. */
export async function startWork(
  handlers: readonly Job[],
  services: { config: Config; log: Log },
): Promise<void> {
  for (const handler of handlers) {
    for (let i = 0; i < (handler.atOnce ?? 1); i++) {
      await jobs().work<Record<string, unknown>>(
        handler.queue,
        { batchSize: 1, pollingIntervalSeconds: 1 },
        async ([job]) => {
          if (!job) return;
          try {
            await handler.work(job.data, services);
          } catch (error) {
            services.log.error({ err: error, queue: handler.queue, job: job.id }, 'job failed');
            throw error;
          }
        },
      );
    }
  }
}
