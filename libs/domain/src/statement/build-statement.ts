import { type IsoDate, type Month } from '../calendar/iso';
import { dueDate } from '../calendar/trade-day';
import { negated, positive } from '../ledger/posting';
import { checkStatement } from './check-statement';
import { rfReference } from './creditor-reference';
import {
  type StatementLine,
  type StatementLineKind,
  type StatementSnapshot,
  type StatementStore,
  chargeKinds,
} from './snapshot';

/** What every document tells of itself. */
interface StatedDocument {
  id: string;
  /** Trade day, on or before the period's last. */
  date: IsoDate;
  reference: string;
  words: string;
}

/** A signed-off ticket; amounts in minor units, as it was signed off. */
export interface StatedTicket extends StatedDocument {
  machines: string[];
  list: number;
  charged: number;
  tax: number;
  /** Must be `charged + tax`. */
  total: number;
  borneByShop: number;
}

/** A contract fee, a late charge, or what a credit note gives back; all above zero. */
export interface StatedCharge extends StatedDocument {
  charged: number;
  tax: number;
}

/** Money that moved, above zero, minor units. */
export interface StatedMoney extends StatedDocument {
  amount: number;
}

export interface StatementInput {
  store: StatementStore;
  period: Month;
  /** The last statement's closing, minor units; 0 for a first statement. */
  opening: number;
  tickets: readonly StatedTicket[];
  fees: readonly StatedCharge[];
  lateCharges: readonly StatedCharge[];
  creditNotes: readonly StatedCharge[];
  payments: readonly StatedMoney[];
  refunds?: readonly StatedMoney[];
  writeOffs?: readonly StatedMoney[];
  terms: StatementTerms;
}

export interface StatementTerms {
  /** The statement's own number, `S-2026-0142`; the payment reference is made from it. */
  number: string;
  /** ISO 4217. */
  currency: string;
  date: IsoDate;
  /** Days after `date` until it is due, 0 to 365. */
  days: number;
}

/**
 * One store's statement of a month: a snapshot that foots, or nothing.
 *
 * Lines are in the order of their dates, charges before what settles them. The same documents in
 * any order give the same snapshot.
 *
 * @throws RangeError naming the first check that fails: figures that do not add up, a document
 *   twice, one dated after the period, amounts that are no whole minor units
 */
export function buildStatement(input: StatementInput): StatementSnapshot {
  const { store, period, opening, terms } = input;
  const lines = statementLines(input);
  const charges = lines.filter(({ kind }) => chargeKinds.includes(kind));
  const total = sumOf(charges, 'total');
  const credited = negated(sumOf(ofKinds(lines, 'credit_note', 'write_off'), 'total'));
  const paid = negated(sumOf(ofKinds(lines, 'payment', 'refund'), 'total'));
  const snapshot: StatementSnapshot = {
    number: terms.number,
    reference: rfReference(terms.number),
    currency: terms.currency,
    store,
    period,
    date: terms.date,
    dueOn: dueDate(terms.date, terms.days),
    opening,
    lines,
    sums: {
      list: sumOf(charges, 'list'),
      charged: sumOf(charges, 'charged'),
      tax: sumOf(charges, 'tax'),
      total,
      borneByShop: sumOf(charges, 'borneByShop'),
      credited,
      paid,
    },
    closing: opening + total - credited - paid,
  };
  const failed = checkStatement(snapshot).find(({ holds }) => !holds);
  if (failed) throw new RangeError(`Statement ${terms.number} is wrong: ${failed.words}`);
  return snapshot;
}

/** True when a statement opens with what the one before it closed with (nothing, for a first). */
export function agreesWith(
  statement: Pick<StatementSnapshot, 'opening'>,
  previous: Pick<StatementSnapshot, 'closing'> | undefined,
): boolean {
  return statement.opening === (previous?.closing ?? 0);
}

const kindOrder: readonly StatementLineKind[] = [
  'ticket',
  'fee',
  'late_charge',
  'credit_note',
  'payment',
  'refund',
  'write_off',
];

function statementLines(input: StatementInput): StatementLine[] {
  return [
    ...input.tickets.map((ticket): StatementLine => ({ kind: 'ticket', ...ticketFacts(ticket) })),
    ...input.fees.map((fee) => chargeLine('fee', fee, 1)),
    ...input.lateCharges.map((charge) => chargeLine('late_charge', charge, 1)),
    ...input.creditNotes.map((note) => chargeLine('credit_note', note, -1)),
    ...input.payments.map((payment) => moneyLine('payment', payment, -1)),
    ...(input.refunds ?? []).map((refund) => moneyLine('refund', refund, 1)),
    ...(input.writeOffs ?? []).map((writeOff) => moneyLine('write_off', writeOff, -1)),
  ].sort(
    (a, b) =>
      compareText(a.date, b.date) ||
      kindOrder.indexOf(a.kind) - kindOrder.indexOf(b.kind) ||
      compareText(a.reference, b.reference) ||
      compareText(a.id, b.id),
  );
}

/** Named one by one: a row from the database may carry more than belongs on a statement. */
function ticketFacts(ticket: StatedTicket): Omit<StatementLine, 'kind'> {
  const { id, date, reference, words, machines, list, charged, tax, total, borneByShop } = ticket;
  return { id, date, reference, words, machines, list, charged, tax, total, borneByShop };
}

function chargeLine(kind: StatementLineKind, document: StatedCharge, sign: 1 | -1): StatementLine {
  const { id, date, reference, words } = document;
  const charged = sign === 1 ? document.charged : negated(document.charged);
  const tax = sign === 1 ? document.tax : negated(document.tax);
  const amounts = { list: charged, charged, tax, total: charged + tax, borneByShop: 0 };
  return { kind, id, date, reference, words, machines: [], ...amounts };
}

function moneyLine(kind: StatementLineKind, document: StatedMoney, sign: 1 | -1): StatementLine {
  const { id, date, reference, words } = document;
  const total = sign * positive(document.amount);
  const amounts = { list: 0, charged: 0, tax: 0, total, borneByShop: 0 };
  return { kind, id, date, reference, words, machines: [], ...amounts };
}

function ofKinds(lines: StatementLine[], ...kinds: StatementLineKind[]): StatementLine[] {
  return lines.filter(({ kind }) => kinds.includes(kind));
}

function sumOf(
  lines: StatementLine[],
  field: 'list' | 'charged' | 'tax' | 'total' | 'borneByShop',
): number {
  return lines.reduce((sum, line) => sum + line[field], 0);
}

/** By code units and not by locale: the order must not depend on the machine that builds it. */
function compareText(a: string, b: string): number {
  return a < b ? -1 : a > b ? 1 : 0;
}
