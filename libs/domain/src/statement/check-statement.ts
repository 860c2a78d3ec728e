import { isIsoDate } from '../calendar/iso';
import { isValidRfReference } from './creditor-reference';
import { monthOfDate } from '../calendar/month';
import { type StatementLine, type StatementSnapshot, chargeKinds } from './snapshot';

export type StatementCheckName =
  | 'whole_amounts'
  | 'line_totals'
  | 'lines_sum'
  | 'tax_sum'
  | 'borne_by_shop_sum'
  | 'settled_sum'
  | 'closing'
  | 'opening'
  | 'documents_once'
  | 'dates'
  | 'reference';

export interface StatementCheck {
  name: StatementCheckName;
  holds: boolean;
  /** What is checked, as a sentence that is true when it holds. */
  words: string;
}

/**
 * Proves a statement from its own figures: everything a careful owner could add up by hand.
 * It reads only the snapshot, never the code that built it, so it also judges stored ones.
 *
 * @param previous the store's statement before; without it the opening is not judged
 */
export function checkStatement(
  snapshot: StatementSnapshot,
  previous?: Pick<StatementSnapshot, 'closing'>,
): StatementCheck[] {
  const { lines, sums, opening, closing } = snapshot;
  const charges = lines.filter(isCharge);
  const credits = lines.filter(({ kind }) => kind === 'credit_note' || kind === 'write_off');
  const money = lines.filter(({ kind }) => kind === 'payment' || kind === 'refund');
  const check = (name: StatementCheckName, holds: boolean, words: string) => ({
    name,
    holds,
    words,
  });
  return [
    check(
      'whole_amounts',
      amountsOf(snapshot).every(Number.isSafeInteger),
      'every amount is whole',
    ),
    check('line_totals', lines.every(totalsUp), 'each line’s total is what was charged plus tax'),
    check(
      'lines_sum',
      add(charges, 'charged') === sums.charged &&
        add(charges, 'list') === sums.list &&
        add(charges, 'total') === sums.total,
      'the lines add up to the stated sums',
    ),
    check(
      'tax_sum',
      add(charges, 'tax') === sums.tax && sums.charged + sums.tax === sums.total,
      'the tax of the lines adds up to the stated tax',
    ),
    check(
      'borne_by_shop_sum',
      add(charges, 'borneByShop') === sums.borneByShop,
      'what the shop bore adds up to the stated sum',
    ),
    check(
      'settled_sum',
      add(credits, 'total') + sums.credited === 0 && add(money, 'total') + sums.paid === 0,
      'payments and credits add up to the stated sums',
    ),
    check(
      'closing',
      closing === opening + add(lines, 'total') &&
        closing === opening + sums.total - sums.credited - sums.paid,
      'closing is opening plus charges less payments and credits',
    ),
    check(
      'opening',
      previous === undefined || opening === previous.closing,
      'it opens with what the last statement closed with',
    ),
    check(
      'documents_once',
      new Set(lines.map(({ kind, id }) => `${kind} ${id}`)).size === lines.length,
      'each ticket and each other document stands on it once',
    ),
    check('dates', datesHold(snapshot), 'every date exists and none is after the period'),
    check('reference', isValidRfReference(snapshot.reference), 'the payment reference is valid'),
  ];
}

function isCharge({ kind }: StatementLine): boolean {
  return chargeKinds.includes(kind);
}

function totalsUp(line: StatementLine): boolean {
  if (isCharge(line) || line.kind === 'credit_note') return line.charged + line.tax === line.total;
  return line.charged === 0 && line.tax === 0;
}

function add(lines: StatementLine[], field: 'list' | 'charged' | 'tax' | 'total' | 'borneByShop') {
  return lines.reduce((sum, line) => sum + line[field], 0);
}

function amountsOf({ opening, closing, sums, lines }: StatementSnapshot): number[] {
  const ofLines = lines.flatMap((line) => [
    line.list,
    line.charged,
    line.tax,
    line.total,
    line.borneByShop,
  ]);
  return [opening, closing, ...Object.values(sums), ...ofLines];
}

function datesHold({ period, date, dueOn, lines }: StatementSnapshot): boolean {
  const inTime = lines.every((line) => isIsoDate(line.date) && monthOfDate(line.date) <= period);
  return inTime && isIsoDate(date) && isIsoDate(dueOn) && dueOn >= date;
}
