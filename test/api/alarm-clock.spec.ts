import { setTimeout as wait } from 'node:timers/promises';
import { closeJobs, jobs, openJobs } from '../../server/src/core/jobs/boss';
import { createLog } from '../../server/src/core/logging';
import { testDatabase } from '../support/postgres';

const log = createLog('silent', 'test');

/** The worker's connection to the queues, under the role that it has: it owns no table of theirs. */
async function opened(appUrl: string, worker: boolean): Promise<void> {
  await openJobs({ url: appUrl, log, worker });
}

describe('the alarm clock', () => {
  afterEach(() => closeJobs());

  it('wakes the sweep by itself, minute after minute', async () => {
    const { appUrl } = await testDatabase();
    await opened(appUrl, false);
    await jobs().schedule('sweep', '* * * * *', {});
    await closeJobs();

    await opened(appUrl, true);
    let waiting = 0;
    for (const until = Date.now() + 20_000; !waiting && Date.now() < until; await wait(100)) {
      waiting = await jobs().getQueueSize('sweep');
    }

    expect(waiting).toBe(1);
  });
});
