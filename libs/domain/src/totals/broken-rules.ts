import { addUp } from '../money/amount';
import { taxOn } from '../tax/tax';
import { type DocumentTotals } from './document-totals';

export type TotalsRule =
  'BR-CO-10' | 'BR-CO-13' | 'BR-CO-14' | 'BR-CO-15' | 'BR-CO-16' | 'BR-CO-17' | 'BR-S-08';

export interface BrokenRule {
  rule: TotalsRule;
  stated: number;
  /** What the stated total should have been. */
  due: number;
}

/**
 * Which rules of EN 16931-1 the stated totals of a document break. A total that its lines do not
 * add up to is an error, however small. For the categories taken together, the bases must add up
 * to the total without tax (what BR-S-08 and its siblings say of each).
 */
export function brokenTotalRules(stated: DocumentTotals): BrokenRule[] {
  const { lines, allowances, charges, withoutTax, tax, withTax, categories } = stated;
  const checks: BrokenRule[] = [
    { rule: 'BR-CO-10', stated: lines, due: addUp(stated.lineNets) },
    { rule: 'BR-CO-13', stated: withoutTax, due: addUp([lines, -allowances, charges]) },
    { rule: 'BR-S-08', stated: addUp(categories.map(({ base }) => base)), due: withoutTax },
    ...categories.map(({ base, basisPoints, tax: own }) => ({
      rule: 'BR-CO-17' as const,
      stated: own,
      due: taxOn(base, basisPoints),
    })),
    { rule: 'BR-CO-14', stated: tax, due: addUp(categories.map((category) => category.tax)) },
    { rule: 'BR-CO-15', stated: withTax, due: addUp([withoutTax, tax]) },
    {
      rule: 'BR-CO-16',
      stated: stated.payable,
      due: addUp([withTax, -stated.prepaid, stated.rounding]),
    },
  ];
  return checks.filter((check) => check.stated !== check.due);
}
