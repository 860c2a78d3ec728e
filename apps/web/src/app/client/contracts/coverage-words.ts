import { wordFor } from '@lib/ui/words/words';
import { type Contract } from './contracts-api';

/** What the fee pays for: "Labour and parts of dryers", or that it pays for the rounds alone. */
export function coverageWords({ trip, labour, parts, kinds }: Contract['coverage']): string {
  const covered = [trip ? 'the trip' : '', labour ? 'labour' : '', parts ? 'parts' : ''].filter(
    Boolean,
  );
  if (covered.length === 0) return 'The rounds alone; repairs are charged as always.';
  const what =
    covered.length > 1 ? `${covered.slice(0, -1).join(', ')} and ${covered.at(-1)}` : covered[0];
  const which = kinds.length > 0 ? `of every ${kinds.map(wordFor).join(', ')}` : 'of every machine';
  return `The rounds, and of repairs ${what} ${which}.`;
}
