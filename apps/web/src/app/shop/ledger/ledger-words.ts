import { type AccountBalance, type AccountCode, type DocumentKind } from './ledger-api';

/** What each account is called, and what a balance of it means. */
const accounts: Record<AccountCode, readonly [name: string, meaning: string]> = {
  unbilled: ['Not stated yet', 'signed off, and on no statement'],
  receivable: ['Receivable', 'stated, and not paid'],
  card_clearing: ['Card clearing', 'paid by card, on its way to the bank'],
  bank: ['Bank and cash', 'received by transfer, cheque and in cash'],
  tax_payable: ['Tax payable', 'charged for the tax office'],
  revenue_trip: ['Trips', ''],
  revenue_labour: ['Labour', ''],
  revenue_parts: ['Parts', ''],
  revenue_contract: ['Contract fees', ''],
  revenue_late: ['Late charges', ''],
  write_off: ['Written off', 'given up as lost'],
  absorbed_cost: ['Borne by us', 'what our mistakes, warranty and goodwill cost us'],
  absorbed_offset: ['Borne by us, offset', 'the same once more, so that the books balance'],
};

export const accountCodes = Object.keys(accounts) as AccountCode[];

export function accountName(account: AccountCode): string {
  return accounts[account][0];
}

export function accountMeaning(account: AccountCode): string {
  return accounts[account][1];
}

const groups: Record<AccountBalance['group'], string> = {
  assets: 'What is owed to us or ours',
  liabilities: 'What we owe',
  revenues: 'What we earned',
  expenses: 'What it cost us',
};

export function groupName(group: AccountBalance['group']): string {
  return groups[group];
}

const documents: Record<DocumentKind, string> = {
  ticket: 'ticket',
  absorbed: 'borne by us',
  fee: 'contract fee',
  late_charge: 'late charge',
  statement: 'statement',
  payment: 'payment',
  refund: 'refund',
  credit_note: 'credit note',
  write_off: 'write-off',
};

export const documentKinds = Object.keys(documents) as DocumentKind[];

export function documentWords(kind: DocumentKind): string {
  return documents[kind];
}

/** Where a document can be looked at; none for those without a page of their own. */
export function documentLink(kind: DocumentKind, id: string): readonly string[] | undefined {
  if (kind === 'statement') return ['/shop/statements', id];
  if (kind === 'ticket' || kind === 'absorbed') return ['/shop/tickets', id];
  if (kind === 'payment') return ['/shop/payments', id];
  return undefined;
}
