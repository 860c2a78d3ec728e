import { foundAndDone } from '@lib/domain';
import { minutesText, wordFor } from '@lib/ui';
import { type TicketJob, type TicketLine } from './tickets-api';

/** How much of it: "35 min", "2"; '' for one piece, which needs no saying. */
export function quantityWords({ unit, quantityMilli }: TicketLine): string {
  if (unit === 'minute') return minutesText(Math.round(quantityMilli / 1000));
  return quantityMilli === 1000 ? '' : String(quantityMilli / 1000);
}

/** What was found and done on a machine, in one line. */
export function jobWords({ finding, action, cause, result }: TicketJob): string {
  if (result === 'nothing_found') return finding || 'Nothing found';
  return foundAndDone(finding, action) || wordFor(cause ?? result ?? '');
}

/** "3 machines, one trip" */
export function ticketWords(jobs: readonly TicketJob[]): string {
  const machines = jobs.filter(({ machine }) => machine).length;
  return `${machines === 1 ? '1 machine' : `${machines} machines`}, one trip`;
}
