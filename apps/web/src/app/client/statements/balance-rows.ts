import { type Statement } from './statements-api';

export interface BalanceRow {
  readonly words: string;
  readonly day?: string;
  readonly amount: number;
  /** A balance, not something that changes it. */
  readonly sum?: boolean;
}

const alone = new Set(['payment', 'refund', 'credit_note', 'write_off', 'fee', 'late_charge']);

/**
 * From the balance before to the balance after: the visits together, everything else by itself, so
 * that the column adds up to the cent.
 */
export function balanceRows({ opening, closing, lines }: Statement): BalanceRow[] {
  const tickets = lines.filter(({ kind }) => !alone.has(kind));
  const charged = tickets.reduce((sum, line) => sum + line.charged, 0);
  const tax = tickets.reduce((sum, line) => sum + line.tax, 0);
  return [
    { words: 'Balance before', amount: opening, sum: true },
    ...(tickets.length > 0 ? [{ words: 'Visits of the month', amount: charged }] : []),
    ...(tax !== 0 ? [{ words: 'Tax on them', amount: tax }] : []),
    ...lines
      .filter(({ kind }) => alone.has(kind))
      .map(({ words, reference, date, total }) => ({
        words: [words, reference].filter(Boolean).join(', '),
        day: date,
        amount: total,
      })),
    { words: 'Balance', amount: closing, sum: true },
  ];
}
