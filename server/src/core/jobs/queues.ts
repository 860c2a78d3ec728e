import PgBoss from 'pg-boss';

/**
 * The job queues. pg-boss is the alarm clock and the hands; what is to be done stands in the domain
 * tables, so a lost or doubled job loses and doubles nothing (docs/decisions/0006-jobs.md).
 */
export const queues = {
  /** Every minute: what fell due in any shop (months, rounds, trials, payments without an answer). */
  sweep: { retryLimit: 0, expireInSeconds: 300 },
  /** Builds a chunk of a month's statements of one shop. */
  'statements-build': { retryLimit: 5, retryDelay: 5, retryBackoff: true, expireInSeconds: 600 },
  /** Renders a chunk of statements to PDF. */
  'statements-render': { retryLimit: 5, retryDelay: 5, retryBackoff: true, expireInSeconds: 600 },
  /** Hands a chunk of one shop's deliveries to the mail server. */
  'deliveries-send': { retryLimit: 5, retryDelay: 5, retryBackoff: true, expireInSeconds: 600 },
  /** Hands mails of sign-in and the platform to the mail server. */
  'platform-mails-send': { retryLimit: 5, retryDelay: 5, retryBackoff: true, expireInSeconds: 300 },
  /** Works a stored event of the card payment service. */
  'stripe-event': { retryLimit: 10, retryDelay: 5, retryBackoff: true, expireInSeconds: 120 },
  /** Plans the rounds of one shop's contracts that fall due soon. */
  'rounds-plan': { retryLimit: 3, retryDelay: 30, retryBackoff: true, expireInSeconds: 300 },
  /** Checks or applies an uploaded list. */
  'import-work': { retryLimit: 3, retryDelay: 5, retryBackoff: true, expireInSeconds: 900 },
  /** Posts what the shop bore of a signed-off ticket, by the warranty rules. */
  'warranty-absorb': { retryLimit: 5, retryDelay: 5, retryBackoff: true, expireInSeconds: 120 },
} as const satisfies Record<string, PgBoss.RetryOptions & PgBoss.ExpirationOptions>;

/**
 * Through this queue of its own pg-boss rings what is scheduled. It would make it when a worker
 * starts, but a worker's role may not, and pg-boss then says nothing and never rings.
 */
const alarmQueue = '__pgboss__send-it';

export type QueueName = keyof typeof queues;

/** Creates the queue tables and the queues as their owner, and lets the working roles use them. */
export async function createQueues(ownerUrl: string): Promise<void> {
  const boss = new PgBoss({
    connectionString: ownerUrl,
    supervise: false,
    schedule: false,
    max: 2,
  });
  // pg-boss reports background trouble here; without a listener it would end the process.
  boss.on('error', () => undefined);
  await boss.start();
  try {
    for (const [name, options] of Object.entries(queues)) {
      await boss.createQueue(name, { name, ...options });
      await boss.updateQueue(name, { name, ...options });
    }
    await boss.createQueue(alarmQueue);
    const db = boss.getDb();
    for (const role of ['tw_app', 'tw_platform']) {
      await db.executeSql(`grant usage, create on schema pgboss to ${role}`, []);
      await db.executeSql(
        `grant select, insert, update, delete on all tables in schema pgboss to ${role}`,
        [],
      );
      await db.executeSql(`grant execute on all functions in schema pgboss to ${role}`, []);
    }
  } finally {
    await boss.stop({ graceful: false, wait: true });
  }
}
