import { type Payment, type StoreBalance } from './payments-api';

type Settled = Pick<Payment, 'amount' | 'storeName' | 'allocations' | 'credit' | 'balance'>;

/** What a payment did: "$500.00 from Quay 9 settle S-0020. It still owes $20.00." */
export function settledWords(payment: Settled, money: (amount: number) => string): string {
  const { allocations, credit, balance, storeName } = payment;
  const names = allocations.map(({ statementName }) => statementName).join(' and ');
  const went = names ? `went to ${names}` : 'is kept as a credit';
  const left = names && credit > 0 ? `, and ${money(credit)} is kept as a credit` : '';
  const owes = balance > 0 ? ` It still owes ${money(balance)}.` : ' It owes nothing now.';
  return `${money(payment.amount)} from ${storeName} ${went}${left}.${owes}`;
}

type Owed = Pick<StoreBalance, 'storeName' | 'balance' | 'overdue'>;

/** What a store owes before a payment: "Quay 9 owes $1,996.06, all of it overdue." */
export function owedWords(
  { storeName, balance, overdue }: Owed,
  money: (amount: number) => string,
): string {
  if (balance <= 0) {
    return `${storeName} owes nothing on statements. What comes now is kept as a credit.`;
  }
  if (overdue <= 0) return `${storeName} owes ${money(balance)}, none of it overdue.`;
  const late = overdue >= balance ? 'all of it' : `${money(overdue)} of it`;
  return `${storeName} owes ${money(balance)}, ${late} overdue.`;
}
