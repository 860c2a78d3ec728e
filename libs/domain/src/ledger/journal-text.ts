import { decimalFromAmount } from '../money/amount';
import { accountGroups } from './accounts';
import { type LedgerDocument, balanced } from './posting';

export interface JournalOptions {
  /** ISO 4217 code, `USD`. */
  currency: string;
  /** What a store is called in account names; its id when not given. */
  storeName?: (storeId: string) => string;
}

/**
 * The documents as a plain-text journal that hledger and ledger read, one transaction each, so that
 * a shop can prove its books with a program that is not ours. Accounts read
 * `assets:receivable:STORE`. Source of the format: hledger manual, "Journal" (transactions,
 * postings, comments).
 *
 * @throws RangeError when a document does not balance
 */
export function journalText(
  documents: Iterable<LedgerDocument>,
  { currency, storeName = (id) => id }: JournalOptions,
): string {
  const transactions: string[] = [];
  for (const document of documents) {
    const postings = balanced(document).postings.map(({ account, storeId, amount }) => {
      const store = nameText(storeName(storeId)) || nameText(storeId);
      const name = `${accountGroups[account]}:${account}:${store}`;
      return `    ${name}  ${decimalFromAmount(amount, currency)} ${currency}`;
    });
    const title = `${document.date} (${nameText(document.reference)}) ${document.kind}`;
    transactions.push([title, ...postings, ''].join('\n'));
  }
  return transactions.join('\n');
}

/** Characters with a meaning of their own in the format become spaces, and spaces single ones. */
function nameText(text: string): string {
  return text.replace(/[\s:;|()[\]@=]+/g, ' ').trim();
}
