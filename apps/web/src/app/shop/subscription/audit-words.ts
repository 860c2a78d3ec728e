import { wordFor } from '@lib/ui';
import { type AuditRow } from './subscription-api';

/** The page of what an act was done to, by its kind. */
const places: Readonly<Record<string, string>> = {
  visit: '/shop/visits',
  ticket: '/shop/tickets',
  call: '/shop/calls',
  machine: '/shop/machines',
  store: '/shop/stores',
  client: '/shop/clients',
  contract: '/shop/contracts',
  payment: '/shop/payments',
  import: '/shop/imports',
  part: '/shop/parts',
  edition: '/shop/price-book',
};

export function subjectLink({
  subjectKind,
  subjectId,
}: Pick<AuditRow, 'subjectKind' | 'subjectId'>): readonly string[] | undefined {
  const place = subjectKind ? places[subjectKind] : undefined;
  return place && subjectId ? [place, subjectId] : undefined;
}

/** "from up, to down": what was noted beside the act, values in words. */
export function detailsWords({ details }: Pick<AuditRow, 'details'>): string {
  const from = details['from'];
  const to = details['to'];
  const change =
    typeof from === 'string' && typeof to === 'string'
      ? [`from ${wordFor(from)} to ${wordFor(to)}`]
      : [];
  const rest = Object.entries(details)
    .filter(([name]) => !(change.length && (name === 'from' || name === 'to')))
    .map(([name, value]) => detail(name, value))
    .filter(Boolean);
  return [...change, ...rest].join(', ');
}

function detail(name: string, value: unknown): string {
  if (value === null || value === '' || value === undefined) return '';
  // Ids say nothing to a person; what they name is behind the row's link.
  if (/[0-9a-f]{8}-[0-9a-f]{4}-/.test(JSON.stringify(value))) return '';
  // What somebody wrote speaks for itself.
  if (name === 'words' || name === 'reason') return String(value);
  const text = Array.isArray(value)
    ? value.map((one) => wordFor(String(one))).join(' and ')
    : typeof value === 'object'
      ? JSON.stringify(value)
      : wordFor(String(value));
  const label = name.replaceAll(/([a-z])([A-Z])/g, '$1 $2').toLowerCase();
  return `${label} ${text}`;
}
