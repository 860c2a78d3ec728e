import { type AccountCode, accountCodes } from './accounts';
import { type Posting, minor } from './posting';

export interface TrialBalance {
  /** Sum of each account, minor units: debit above zero, credit below. */
  accounts: Record<AccountCode, number>;
  /** Sum over all accounts. Anything but zero means the books are broken. */
  total: number;
}

/** The balance of every account, of all stores in the postings or of one. */
export function trialBalance(postings: Iterable<Posting>, storeId?: string): TrialBalance {
  const accounts = Object.fromEntries(accountCodes.map((code) => [code, 0])) as Record<
    AccountCode,
    number
  >;
  let total = 0;
  for (const posting of postings) {
    if (storeId !== undefined && posting.storeId !== storeId) continue;
    accounts[posting.account] += minor(posting.amount);
    total += posting.amount;
  }
  return { accounts, total };
}

/** What a store owes on its statements, minor units; below zero when it paid more than it owes. */
export function openBalance(postings: Iterable<Posting>, storeId: string): number {
  return trialBalance(postings, storeId).accounts.receivable;
}
