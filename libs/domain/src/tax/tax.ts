import { exact, roundFraction } from '../money/rounding';
import { settleQuotas } from '../money/share';
import { type LineKind } from '../words/trade';
import { type Exemption, type TaxRate, type TaxRounding } from './rate';

/** The tax on one kind of line at one place on one day. */
export interface RateInForce {
  /** State and local taxes added; 0 when nothing is levied. */
  basisPoints: number;
  /** The rows it is the sum of, from the widest place to the narrowest. */
  parts: TaxRate[];
}

/**
 * The rate in force: of every place on the way to the store's, the row last valid, added up.
 * The taxes are added before anything is rounded, as section 324 of the Streamlined Sales and Use
 * Tax Agreement allows.
 *
 * @param where `on` is the trade day of the work
 */
export function rateFor(
  rates: readonly TaxRate[],
  where: { kind: LineKind; place: string; on: string },
): RateInForce {
  const parts: TaxRate[] = [];
  for (const place of placesAround(where.place)) {
    let inForce: TaxRate | undefined;
    for (const rate of rates) {
      if (rate.place !== place || rate.kind !== where.kind || rate.validFrom > where.on) continue;
      if (!inForce || rate.validFrom >= inForce.validFrom) inForce = rate;
    }
    if (inForce) parts.push(inForce);
  }
  const thousandths = parts.reduce((total, part) => total + rateThousandths(part.basisPoints), 0n);
  return { basisPoints: Number(thousandths) / 1000, parts };
}

/** True when the client pays no tax on such a line that day. */
export function isExempt(exemption: Exemption | null, line: { kind: LineKind; on: string }) {
  if (!exemption) return false;
  const { from, until, kinds } = exemption;
  const inTime = (from === null || from <= line.on) && (until === null || line.on <= until);
  return inTime && (kinds === null || kinds.includes(line.kind));
}

/**
 * Tax on an amount, rounded half up to the minor unit: up to the next cent when the third decimal
 * is greater than four. A credit is taxed as the mirror of its charge.
 *
 * @param amount minor units
 * @throws RangeError for a negative rate or one finer than a thousandth of a basis point
 */
export function taxOn(amount: number, basisPoints: number): number {
  return roundFraction(exact(amount) * rateThousandths(basisPoints), TAX_BASE, 'half_up');
}

export interface TaxableLine {
  /** What is charged, without tax, in minor units. */
  amount: number;
  basisPoints: number;
}

/**
 * The tax of each line, in the order given. Rounded by line, every line is rounded for itself.
 * Rounded by invoice, the tax of each rate is rounded once on the sum of its lines, and the lines
 * share it by largest remainder, so that they still add up to it.
 */
export function taxByLine(lines: readonly TaxableLine[], rounding: TaxRounding): number[] {
  if (rounding === 'line') return lines.map((line) => taxOn(line.amount, line.basisPoints));
  const taxes = lines.map(() => 0);
  for (const basisPoints of new Set(lines.map((line) => line.basisPoints))) {
    const members = lines
      .map((line, index) => ({ line, index }))
      .filter(({ line }) => line.basisPoints === basisPoints);
    const quotas = members.map(
      ({ line }) => exact(line.amount) * rateThousandths(line.basisPoints),
    );
    const total = roundFraction(
      quotas.reduce((a, b) => a + b, 0n),
      TAX_BASE,
      'half_up',
    );
    settleQuotas(quotas, TAX_BASE, total).forEach((tax, i) => {
      const member = members[i];
      if (member) taxes[member.index] = tax;
    });
  }
  return taxes;
}

/** Thousandths of a basis point in the whole. */
const TAX_BASE = 10_000_000n;

/**
 * A rate as an exact whole number. Rates of three decimals of a percent and finer are levied
 * (8.875 %), so basis points come with decimals; these are read as the decimals they were written
 * with, not as the binary fraction that stands for them.
 */
function rateThousandths(basisPoints: number): bigint {
  const thousandths = Math.round(basisPoints * 1000);
  if (!(basisPoints >= 0) || Math.abs(thousandths / 1000 - basisPoints) > 1e-9) {
    throw new RangeError(`Not a tax rate in basis points: ${basisPoints}`);
  }
  return exact(thousandths);
}

/** `MN/Hennepin` lies in everywhere, in `MN`, and in itself. */
function placesAround(place: string): string[] {
  const names = place.split('/').filter((name) => name !== '');
  return ['', ...names.map((_, i) => names.slice(0, i + 1).join('/'))];
}
