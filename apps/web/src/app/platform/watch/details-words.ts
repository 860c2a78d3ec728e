import { wordFor } from '@lib/ui';

/** The details of an audit row in one line: "plan: Depot, note: asked by mail". */
export function detailsWords(details: Readonly<Record<string, unknown>>): string {
  return Object.entries(details)
    .filter(([, value]) => value !== null && value !== '')
    .map(
      ([name, value]) =>
        `${wordFor(name)}: ${typeof value === 'string' ? value : JSON.stringify(value)}`,
    )
    .join(', ');
}
