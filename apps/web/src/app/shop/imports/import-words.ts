import { counted } from '@lib/ui';
import { type Import } from './imports-api';

/** How an import stands, in words. */
export function stateWords({ state, counts, rowsTotal }: Import): string {
  switch (state) {
    case 'waiting':
      return 'waits to be checked';
    case 'checking':
      return 'is being checked';
    case 'checked':
      return counts.bad
        ? `${counted(counts.bad, 'row')} to put right`
        : 'checked, waits to be applied';
    case 'applying':
      return 'is being applied';
    case 'applied':
      return `applied, ${counted(rowsTotal, 'row')}`;
    case 'failed':
      return 'could not be read';
    case 'discarded':
      return 'put away';
  }
}

/** Whether the server is at work on it. */
export function runs({ state }: Import): boolean {
  return state === 'waiting' || state === 'checking' || state === 'applying';
}

/** What applying it would do: "12 new stores, 3 changed". */
export function effectWords({ kind, counts }: Import): string {
  const one = kind.slice(0, -1);
  const parts = [
    counts.new ? `${counts.new} new ${counts.new === 1 ? one : kind}` : '',
    counts.changed ? `${counts.changed} changed` : '',
    counts.unchanged ? `${counts.unchanged} as they are` : '',
  ].filter(Boolean);
  return parts.join(', ') || 'nothing';
}
