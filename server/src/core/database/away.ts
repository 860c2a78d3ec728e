import { setTimeout as wait } from 'node:timers/promises';
import { type Log } from '../logging';

/** Codes of PostgreSQL and of the network that say: not now, perhaps in a moment. */
const awayCodes = new Set([
  '08000',
  '08003',
  '08006',
  '53300',
  '57P01',
  '57P02',
  '57P03',
  'ECONNREFUSED',
  'ECONNRESET',
  'EPIPE',
  'ETIMEDOUT',
]);

/** Whether an error only says that the database is not there right now. */
export function databaseIsAway(error: unknown): boolean {
  const { name = '', original } = error as { name?: string; original?: unknown };
  if (/^Sequelize.*Connection/.test(name)) return true;
  const cause = (original ?? error) as { code?: unknown; message?: unknown };
  if (typeof cause.code === 'string' && awayCodes.has(cause.code)) return true;
  return /^(Connection terminated|Client has encountered a connection error)/.test(
    typeof cause.message === 'string' ? cause.message : '',
  );
}

const mostSeconds = 120;

/** Runs `work` once the database answers: it may be restarting just when a process starts. */
export async function whenDatabaseAnswers<T>(log: Log, work: () => Promise<T>): Promise<T> {
  for (let tries = 1; ; tries += 1) {
    try {
      return await work();
    } catch (error) {
      if (!databaseIsAway(error) || tries >= mostSeconds) throw error;
      log.warn({ err: error, tries }, 'the database does not answer yet');
      await wait(1000);
    }
  }
}
