import { addUp } from '../money/amount';
import { exact, roundFraction } from '../money/rounding';
import { taxOn } from '../tax/tax';

/**
 * Totals of an invoice-like document as EN 16931-1 computes them. The numbers in the comments are
 * the standard's business terms (BT) and rules (BR-CO); all amounts are minor units.
 */
export interface DocumentLine {
  /** BT-129 in thousandths; negative for a return. */
  quantityMilli: number;
  /** BT-146, without tax. */
  unitPrice: number;
  /** BT-149 in thousandths: what quantity the unit price is for; 1000 unless given. */
  priceBaseMilli?: number;
  /** BT-136, taken off the line. */
  allowances?: readonly number[];
  /** BT-141, added to the line. */
  charges?: readonly number[];
  category: TaxCategory;
}

/** BT-151 and BT-152: standard `S`, zero `Z`, exempt `E`, outside the tax `O`, and so on. */
export interface TaxCategory {
  code: string;
  basisPoints: number;
}

/** BG-20 or BG-21: an allowance or charge on the whole document. */
export interface DocumentAdjustment {
  amount: number;
  category: TaxCategory;
}

export interface DocumentToTotal {
  lines: readonly DocumentLine[];
  allowances?: readonly DocumentAdjustment[];
  charges?: readonly DocumentAdjustment[];
  /** BT-113. */
  prepaid?: number;
  /** BT-114, to pay a rounder amount. */
  rounding?: number;
}

/** BG-23: what is taxed at one rate of one category. */
export interface CategoryTotal extends TaxCategory {
  /** BT-116. */
  base: number;
  /** BT-117. */
  tax: number;
}

export interface DocumentTotals {
  /** BT-131, in the order of the lines. */
  lineNets: number[];
  /** BT-106. */
  lines: number;
  /** BT-107. */
  allowances: number;
  /** BT-108. */
  charges: number;
  /** BT-109. */
  withoutTax: number;
  /** BT-110. */
  tax: number;
  /** BT-112. */
  withTax: number;
  /** BT-113. */
  prepaid: number;
  /** BT-114. */
  rounding: number;
  /** BT-115. */
  payable: number;
  /** In the order the categories first appear. */
  categories: CategoryTotal[];
}

/**
 * @throws RangeError for numbers that are not safe integers, a price base below 1, or a bad rate
 */
export function documentTotals(document: DocumentToTotal): DocumentTotals {
  const { allowances = [], charges = [], prepaid = 0, rounding = 0 } = document;
  const lineNets = document.lines.map(lineNet);
  const categories = categoryTotals([
    ...document.lines.map((line, i) => ({ amount: lineNets[i] ?? 0, category: line.category })),
    ...allowances.map(({ amount, category }) => ({ amount: -amount, category })),
    ...charges,
  ]);
  const lines = addUp(lineNets);
  const allowanceTotal = addUp(allowances.map(({ amount }) => amount));
  const chargeTotal = addUp(charges.map(({ amount }) => amount));
  const withoutTax = addUp([lines, -allowanceTotal, chargeTotal]);
  const tax = addUp(categories.map((category) => category.tax));
  const withTax = addUp([withoutTax, tax]);
  return {
    lineNets,
    lines,
    allowances: allowanceTotal,
    charges: chargeTotal,
    withoutTax,
    tax,
    withTax,
    prepaid,
    rounding,
    payable: addUp([withTax, -prepaid, rounding]),
    categories,
  };
}

/** BT-131: quantity x price per base quantity, less allowances, plus charges; rounded once. */
export function lineNet(line: DocumentLine): number {
  const base = line.priceBaseMilli ?? 1_000;
  if (base < 1) throw new RangeError(`A price base is at least one thousandth: ${base}`);
  const gross = roundFraction(exact(line.quantityMilli) * exact(line.unitPrice), base, 'half_up');
  return addUp([
    gross,
    ...(line.allowances ?? []).map((amount) => -amount),
    ...(line.charges ?? []),
  ]);
}

/** BR-CO-17 (tax = base x rate, rounded to the minor unit) for every category and rate. */
function categoryTotals(amounts: readonly DocumentAdjustment[]): CategoryTotal[] {
  const totals = new Map<string, CategoryTotal>();
  for (const { amount, category } of amounts) {
    const key = `${category.code} ${category.basisPoints}`;
    const known = totals.get(key);
    totals.set(key, { ...category, base: addUp([known?.base ?? 0, amount]), tax: 0 });
  }
  return [...totals.values()].map((category) => ({
    ...category,
    tax: taxOn(category.base, category.basisPoints),
  }));
}
