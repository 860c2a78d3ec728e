import { addUp } from '../money/amount';
import { type Bearer, type LineKind } from '../words/trade';
import { type AccountCode } from './accounts';
import { type Posting, gathered, minor, negated, reversed } from './posting';

/** Where a line of each kind is earned. Minutes lost to bad access are labour. */
const revenueAccounts: Record<LineKind, AccountCode> = {
  trip: 'revenue_trip',
  labour: 'revenue_labour',
  access: 'revenue_labour',
  part: 'revenue_parts',
  fee: 'revenue_contract',
  late_charge: 'revenue_late',
};

/** A line that a store is charged: minor units without tax; below zero for an allowance. */
export interface RevenueLine {
  kind: LineKind;
  charged: number;
}

/** A priced line of a ticket. Amounts in minor units. */
export interface TicketPostingLine extends RevenueLine {
  bearer: Bearer;
  /** What the line cost the shop itself: wages and purchase price. */
  ownCost: number;
}

export interface ChargedDocument {
  storeId: string;
  lines: readonly RevenueLine[];
  /** Tax of the whole document, minor units: already rounded the shop's way. */
  tax: number;
}

export interface TicketForPosting extends ChargedDocument {
  lines: readonly TicketPostingLine[];
}

/**
 * What a signed-off ticket posts: the store's lines and their tax to `unbilled`. Lines a contract or
 * a supplier bears post nothing: the one is paid by the contract's fee, the other is claimed. What
 * the shop bore is a document of its own (`absorbedPostings`).
 *
 * @throws RangeError when a line that the store does not bear charges it all the same
 */
export function ticketPostings(ticket: TicketForPosting): Posting[] {
  for (const { bearer, charged } of ticket.lines) {
    if (bearer !== 'store' && charged !== 0) {
      throw new RangeError(`A line borne by ${bearer} must charge the store nothing`);
    }
  }
  return gathered(chargePostings(ticket, 'unbilled'));
}

/** The own cost of what the shop bore of a ticket: its mistakes, its warranty and goodwill. */
export function absorbedPostings(ticket: Pick<TicketForPosting, 'storeId' | 'lines'>): Posting[] {
  const { storeId } = ticket;
  const absorbed = ticket.lines
    .filter(({ bearer }) => bearer === 'shop' || bearer === 'goodwill')
    .flatMap(({ ownCost }): Posting[] => [
      { account: 'absorbed_cost', storeId, amount: minor(ownCost) },
      { account: 'absorbed_offset', storeId, amount: negated(ownCost) },
    ]);
  return gathered(absorbed);
}

/** A contract's fee for a period: it waits in `unbilled` for the month's statement. */
export function feePostings(fee: { storeId: string; charged: number; tax: number }): Posting[] {
  const lines: RevenueLine[] = [{ kind: 'fee', charged: fee.charged }];
  return gathered(chargePostings({ ...fee, lines }, 'unbilled'));
}

/** A charge for late payment: it waits in `unbilled` for the month's statement. */
export function lateChargePostings(charge: {
  storeId: string;
  charged: number;
  tax?: number;
}): Posting[] {
  const { storeId, charged, tax = 0 } = charge;
  return gathered(
    chargePostings({ storeId, lines: [{ kind: 'late_charge', charged }], tax }, 'unbilled'),
  );
}

/**
 * A credit note takes back revenue and its tax, and lowers what the store owes.
 *
 * @param note amounts as they were charged, above zero for what is given back
 */
export function creditNotePostings(note: ChargedDocument): Posting[] {
  return gathered(reversed(chargePostings(note, 'receivable')));
}

function chargePostings(
  { storeId, lines, tax }: ChargedDocument,
  owedOn: 'unbilled' | 'receivable',
): Posting[] {
  const revenue = lines.map(({ kind, charged }): Posting => ({
    account: revenueAccounts[kind],
    storeId,
    amount: negated(minor(charged)),
  }));
  const owed = addUp([...lines.map(({ charged }) => charged), tax]);
  return [
    { account: owedOn, storeId, amount: owed },
    ...revenue,
    { account: 'tax_payable', storeId, amount: negated(tax) },
  ];
}
