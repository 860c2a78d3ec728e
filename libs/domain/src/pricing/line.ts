import { formatMoney } from '../money/amount';
import { multiplyDivide } from '../money/rounding';
import { type PricedLine, PRICE_BASE_MILLI, type VisitToPrice } from './visit';

/** A line with its discount taken off and its list value worked out. */
export function priced(
  visit: VisitToPrice,
  line: Omit<PricedLine, 'discount' | 'list'>,
): PricedLine {
  const gross = multiplyDivide(line.unitPrice, line.quantityMilli, PRICE_BASE_MILLI[line.unit]);
  const discount = discountOff(visit, gross);
  const reasons = [...line.reasons, ...discountReason(visit, discount)];
  return { ...line, discount, list: gross - discount, reasons };
}

/** What the client’s agreement takes off an amount. */
export function discountOff(visit: VisitToPrice, gross: number): number {
  const basisPoints = visit.overrides?.discountBasisPoints ?? 0;
  if (basisPoints < 0 || basisPoints > 10_000) {
    throw new RangeError(`A discount is 0 to 10000 basis points: ${basisPoints}`);
  }
  return multiplyDivide(gross, basisPoints, 10_000);
}

export function discountReason(visit: VisitToPrice, discount: number): string[] {
  if (discount === 0) return [];
  const amount = formatMoney(discount, visit.currency, visit.locale ?? 'en');
  return [`Less the client’s discount: ${amount}`];
}
