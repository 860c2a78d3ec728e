import { wordFor } from '@lib/ui';
import { type Contract } from './contracts-api';

/** What a contract pays for: "Labour and trips, on dryers and changers." */
export function coverageWords({ labour, parts, trip, kinds }: Contract['coverage']): string {
  const paid = [labour ? 'labour' : '', parts ? 'parts' : '', trip ? 'trips' : ''].filter(Boolean);
  if (!paid.length) return 'Only the rounds; repairs are charged.';
  const on = kinds.length
    ? listed(kinds.map((kind) => plural(wordFor(kind))))
    : 'every kind of machine';
  const text = `${listed(paid)} of repairs, on ${on}.`;
  return text.charAt(0).toUpperCase() + text.slice(1);
}

function plural(word: string): string {
  return word.endsWith('y') ? `${word.slice(0, -1)}ies` : `${word}s`;
}

function listed(words: readonly string[]): string {
  const last = words.at(-1) ?? '';
  return words.length < 2 ? last : `${words.slice(0, -1).join(', ')} and ${last}`;
}
