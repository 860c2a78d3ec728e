import { clockText, counted, wordFor } from '@lib/ui';
import { type VisitItem } from './visits-api';

export interface ReadAs {
  readonly locale: string;
  readonly zone: string;
}

/** "10:30 to 12:00", "any time" */
export function windowWords(
  { window }: Pick<VisitItem, 'window'>,
  { locale, zone }: ReadAs,
): string {
  if (!window) return 'any time';
  return `${clockText(window.from, locale, zone)} to ${clockText(window.until, locale, zone)}`;
}

/** What a visit is for, as short as a ticket on the day sheet has room for. */
export function workWords(visit: Pick<VisitItem, 'bays' | 'reason' | 'roundId'>): string {
  const { bays, reason, roundId } = visit;
  if (bays.length > 4) return counted(bays.length, 'machine');
  if (bays.length > 0) return bays.join(', ');
  return roundId ? 'round' : reason;
}

/** "completed, not signed off" */
export function stateWords(visit: Pick<VisitItem, 'state' | 'ticket'>): string {
  const waits = visit.state === 'completed' && !visit.ticket;
  return waits ? 'completed, not signed off' : wordFor(visit.state);
}
