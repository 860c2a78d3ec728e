import { wordFor } from '@lib/ui';
import { type Round } from './contracts-api';

/** How a round stands: what its visit says, once there is one. */
export function roundWords({ state, visitState }: Pick<Round, 'state' | 'visitState'>): string {
  if (state === 'done') return 'done';
  if (state === 'skipped') return 'left out';
  return visitState ? wordFor(visitState) : 'planned';
}
