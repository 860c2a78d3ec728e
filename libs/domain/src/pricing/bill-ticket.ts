import { addUp } from '../money/amount';
import { type Exemption, type TaxRate, type TaxRounding } from '../tax/rate';
import { isExempt, rateFor, taxByLine } from '../tax/tax';
import { type CategoryTotal, documentTotals } from '../totals/document-totals';
import { type Bearer, type LineKind } from '../words/trade';

/** What a line must have to stand on a ticket; whatever else it carries stays with it. */
export interface LineToBill {
  kind: LineKind;
  bearer: Bearer;
  list: number;
  cost: number;
}

export interface TicketToBill<Line extends LineToBill> {
  lines: readonly Line[];
  taxRates: readonly TaxRate[];
  /** The store's tax place. */
  place: string;
  /** The trade day of the work: it decides which taxes are in force. */
  on: string;
  exemption: Exemption | null;
  rounding: TaxRounding;
}

/** Bearers other than the store: what they bear stands on the ticket at no charge. */
export type AbsorbingBearer = Exclude<Bearer, 'store'>;

export type BilledLine<Line extends LineToBill> = Line & {
  /** The list value when the store bears the line, else 0. */
  charged: number;
  /** Rate in force for a charged line; 0 for one that is exempt or not charged. */
  taxBasisPoints: number;
  tax: number;
};

export interface TicketTotals {
  /** List value of all lines: `net` and everything absorbed. */
  list: number;
  /** List value by bearer. */
  absorbed: Record<AbsorbingBearer, number>;
  /** The shop's own cost of what others than the store bear, by bearer. */
  absorbedCost: Record<AbsorbingBearer, number>;
  /** Charged to the store, without tax. */
  net: number;
  tax: number;
  total: number;
  /** What is charged, by rate: taxed `S`, not taxed `Z`, exempt `E` (EN 16931, BG-23). */
  categories: CategoryTotal[];
}

export interface BilledTicket<Line extends LineToBill> {
  lines: BilledLine<Line>[];
  totals: TicketTotals;
}

/**
 * A ticket's lines charged and taxed, and totals that are the sums of these lines: `list` is `net`
 * plus everything absorbed, `total` is `net` plus `tax`, and every tax of a category is that of
 * its lines. Rounded by invoice, they are the totals of EN 16931-1; rounded by line, the standard
 * has none, and a category's tax is the sum of its lines'.
 *
 * @throws RangeError for amounts that are not safe integers, or a bad tax rate
 */
export function billTicket<Line extends LineToBill>(
  ticket: TicketToBill<Line>,
): BilledTicket<Line> {
  const charges = ticket.lines.map((line) => chargeFor(line, ticket));
  const taxes = taxByLine(charges, ticket.rounding);
  const lines = ticket.lines.map((line, i) => ({
    ...line,
    charged: charges[i]?.amount ?? 0,
    taxBasisPoints: charges[i]?.basisPoints ?? 0,
    tax: taxes[i] ?? 0,
  }));
  const categories =
    ticket.rounding === 'line' ? categoriesByLine(charges, taxes) : categoriesByInvoice(charges);
  const net = addUp(categories.map((category) => category.base));
  const tax = addUp(categories.map((category) => category.tax));
  return {
    lines,
    totals: {
      list: addUp(lines.map((line) => line.list)),
      absorbed: byAbsorber(lines, (line) => line.list),
      absorbedCost: byAbsorber(lines, (line) => line.cost),
      net,
      tax,
      total: addUp([net, tax]),
      categories,
    },
  };
}

interface Charge {
  amount: number;
  basisPoints: number;
  /** Undefined for a line that isn't charged. */
  code?: 'S' | 'Z' | 'E';
}

function chargeFor(line: LineToBill, ticket: TicketToBill<LineToBill>): Charge {
  if (line.bearer !== 'store') return { amount: 0, basisPoints: 0 };
  const { taxRates, place, on, exemption } = ticket;
  if (isExempt(exemption, { kind: line.kind, on })) {
    return { amount: line.list, basisPoints: 0, code: 'E' };
  }
  const { basisPoints } = rateFor(taxRates, { kind: line.kind, place, on });
  return { amount: line.list, basisPoints, code: basisPoints === 0 ? 'Z' : 'S' };
}

function categoriesByInvoice(charges: readonly Charge[]): CategoryTotal[] {
  const lines = charges.flatMap(({ code, basisPoints, amount }) =>
    code ? [{ quantityMilli: 1000, unitPrice: amount, category: { code, basisPoints } }] : [],
  );
  return documentTotals({ lines }).categories;
}

function categoriesByLine(charges: readonly Charge[], taxes: readonly number[]): CategoryTotal[] {
  const categories = new Map<string, CategoryTotal>();
  for (const [i, { code, basisPoints, amount }] of charges.entries()) {
    if (!code) continue;
    const key = `${code} ${basisPoints}`;
    const known = categories.get(key) ?? { code, basisPoints, base: 0, tax: 0 };
    categories.set(key, {
      ...known,
      base: addUp([known.base, amount]),
      tax: addUp([known.tax, taxes[i] ?? 0]),
    });
  }
  return [...categories.values()];
}

function byAbsorber(
  lines: readonly LineToBill[],
  amountOf: (line: LineToBill) => number,
): Record<AbsorbingBearer, number> {
  const of = (bearer: AbsorbingBearer) =>
    addUp(lines.filter((line) => line.bearer === bearer).map(amountOf));
  return {
    shop: of('shop'),
    supplier: of('supplier'),
    contract: of('contract'),
    goodwill: of('goodwill'),
  };
}
