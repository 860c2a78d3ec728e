import { compareDates } from '../calendar/trade-day';
import { positive } from '../ledger/posting';
import { type OpenItem } from './ageing';

export interface PaymentAllocation {
  /** Id of the open item paid. */
  id: string;
  /** Minor units, above zero. */
  amount: number;
}

export interface AllocatedPayment {
  allocations: PaymentAllocation[];
  /** Minor units left over once everything was paid: the store's credit. */
  credit: number;
}

/**
 * Applies a payment to the oldest debt first, by due date; among items of one day by id, which is
 * by age as ids are. Items with nothing open are passed over.
 *
 * @param amount minor units, above zero
 * @throws RangeError for an amount of zero or less, or not whole
 */
export function allocatePayment(openItems: readonly OpenItem[], amount: number): AllocatedPayment {
  const oldestFirst = openItems
    .filter(({ open }) => open > 0)
    .sort((a, b) => compareDates(a.dueOn, b.dueOn) || (a.id < b.id ? -1 : 1));
  let left = positive(amount);
  const allocations: PaymentAllocation[] = [];
  for (const { id, open } of oldestFirst) {
    if (left === 0) break;
    const paid = Math.min(left, positive(open));
    allocations.push({ id, amount: paid });
    left -= paid;
  }
  return { allocations, credit: left };
}
