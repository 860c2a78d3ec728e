import { jobs } from '../../server/src/core/jobs/boss';
import { type QueueName } from '../../server/src/core/jobs/queues';
import { jobHandlers } from '../../server/src/jobs';
import { type TestServer } from './app';

/** Works everything that waits in a queue, as the worker process would; answers with how many. */
export async function workQueue(server: TestServer, queue: QueueName): Promise<number> {
  const handler = jobHandlers.find((each) => each.queue === queue);
  if (!handler) throw new Error(`Nothing works the queue ${queue}.`);
  for (let worked = 0; ; worked++) {
    const [job] = await jobs().fetch<Record<string, unknown>>(queue);
    if (!job) return worked;
    await handler.work(job.data, { config: server.config, log: server.log });
    await jobs().complete(queue, job.id);
  }
}
