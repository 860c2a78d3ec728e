import { type Payment } from './payments-api';

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
