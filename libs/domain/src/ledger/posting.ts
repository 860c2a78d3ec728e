import { addUp } from '../money/amount';
import { type AccountCode } from './accounts';

/** `amount` is in minor units of the shop's currency: debit above zero, credit below. */
export interface Posting {
  account: AccountCode;
  storeId: string;
  amount: number;
}

export type DocumentKind =
  | 'ticket'
  /** The own cost of what the shop bore of a ticket, by the ticket's id. */
  | 'absorbed'
  | 'fee'
  | 'late_charge'
  | 'statement'
  | 'payment'
  | 'refund'
  | 'credit_note'
  | 'write_off';

/** What stands behind postings. Once posted it is never changed, only followed by another. */
export interface LedgerDocument {
  kind: DocumentKind;
  /** What people call it: `T-0142`. */
  reference: string;
  /** Trade day, `YYYY-MM-DD`. */
  date: string;
  postings: readonly Posting[];
}

/**
 * Returns the document as it came when its postings sum to zero.
 *
 * @throws RangeError otherwise, or when an amount is no safe integer: such a document must never
 *   be posted
 */
export function balanced<D extends { postings: readonly Posting[] }>(document: D): D {
  const sum = addUp(document.postings.map(({ amount }) => amount));
  if (sum !== 0) throw new RangeError(`Postings sum to ${sum} minor units, not to zero`);
  return document;
}

/**
 * Adds up what goes to the same account and store and leaves out what comes to nothing, so that a
 * document has few, telling entries.
 */
export function gathered(postings: readonly Posting[]): Posting[] {
  const sums = new Map<string, Posting>();
  for (const posting of postings) {
    const key = `${posting.account} ${posting.storeId}`;
    const before = sums.get(key)?.amount ?? 0;
    sums.set(key, { ...posting, amount: before + minor(posting.amount) });
  }
  return balanced({ postings: [...sums.values()].filter(({ amount }) => amount !== 0) }).postings;
}

/** The postings that undo these: what a correcting document posts. */
export function reversed(postings: readonly Posting[]): Posting[] {
  return postings.map((posting) => ({ ...posting, amount: negated(posting.amount) }));
}

/** @throws RangeError unless the amount is a safe integer of minor units */
export function minor(amount: number): number {
  if (!Number.isSafeInteger(amount)) {
    throw new RangeError(`Not a whole number of minor units: ${amount}`);
  }
  return amount;
}

/** @throws RangeError unless the amount is a safe integer above zero */
export function positive(amount: number): number {
  if (minor(amount) <= 0) throw new RangeError(`An amount above zero is needed, not ${amount}`);
  return amount;
}

/** Minus, without the minus zero that would not compare equal to a stored zero. */
export function negated(amount: number): number {
  return amount === 0 ? 0 : -amount;
}
