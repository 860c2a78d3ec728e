import { type AccountCode } from './accounts';
import { type Posting, gathered, minor, negated, positive } from './posting';

export type PaymentMethod = 'card' | 'cheque' | 'cash' | 'transfer';

/** Card money is the processor's until it is paid out; all else is taken to the bank. */
function moneyAccount(method: PaymentMethod): AccountCode {
  return method === 'card' ? 'card_clearing' : 'bank';
}

/**
 * A statement makes what was unbilled owed.
 *
 * @param statement `amount` is what the month's tickets, fees and late charges come to with tax,
 *   minor units; zero posts nothing, and below zero (allowances only) is possible
 */
export function statementPostings(statement: { storeId: string; amount: number }): Posting[] {
  return moved('unbilled', 'receivable', statement.storeId, minor(statement.amount));
}

/** A payment received. @throws RangeError unless the amount is above zero */
export function paymentPostings(payment: {
  storeId: string;
  amount: number;
  method: PaymentMethod;
}): Posting[] {
  const { storeId, amount, method } = payment;
  return moved('receivable', moneyAccount(method), storeId, positive(amount));
}

/** A payment given back, so that it is owed again. @throws RangeError unless above zero */
export function refundPostings(refund: {
  storeId: string;
  amount: number;
  method: PaymentMethod;
}): Posting[] {
  const { storeId, amount, method } = refund;
  return moved(moneyAccount(method), 'receivable', storeId, positive(amount));
}

/** A debt the shop gives up; no revenue is taken back. @throws RangeError unless above zero */
export function writeOffPostings(writeOff: { storeId: string; amount: number }): Posting[] {
  return moved('receivable', 'write_off', writeOff.storeId, positive(writeOff.amount));
}

function moved(from: AccountCode, to: AccountCode, storeId: string, amount: number): Posting[] {
  return gathered([
    { account: to, storeId, amount },
    { account: from, storeId, amount: negated(amount) },
  ]);
}
