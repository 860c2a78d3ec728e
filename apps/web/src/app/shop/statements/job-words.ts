import { wordFor } from '@lib/ui';
import { type StatedJob } from './statements-api';

type Told = Pick<StatedJob, 'reported' | 'found' | 'done' | 'result' | 'testCoins' | 'testAmount'>;

/** What happened to one machine, in the order it happened. */
export function jobWords(job: Told, money: (amount: number) => string): string {
  const parts = [
    job.reported ? `Reported: ${job.reported}` : '',
    job.found ? `found: ${job.found}` : '',
    job.done ? `done: ${job.done}` : '',
    job.result ? `left: ${wordFor(job.result)}` : '',
    job.testAmount ? `${money(job.testAmount)} of ours went in for tests` : '',
  ].filter(Boolean);
  const text = parts.join('; ');
  return text ? `${text.charAt(0).toUpperCase()}${text.slice(1)}.` : '';
}
