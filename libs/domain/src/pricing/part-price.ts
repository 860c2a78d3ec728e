import { exact, roundToStep } from '../money/rounding';
import { type ClientOverrides, type Edition, type MarkupRule } from './edition';
import { PriceBookGap } from './price-book-gap';
import { type PartToPrice } from './visit';

/** Where a part's unit price comes from. */
export type PartPriceSource = 'agreed' | 'price_book' | 'client_markup' | 'markup';

/**
 * What one of a part is sold for: the price agreed for this use; else the part's price in the
 * book; else the cost with the client's markup, or with that of its band. Whoever owns a spare in
 * a storeroom has paid for it already: that is settled by the line, not here.
 *
 * @throws PriceBookGap when no band holds for the cost
 */
export function partUnitPrice(
  part: PartToPrice,
  edition: Edition,
  overrides: ClientOverrides,
): { unitPrice: number; source: PartPriceSource } {
  if (part.fixedPrice != null) return { unitPrice: part.fixedPrice, source: 'agreed' };
  const inBook = edition.partPrices.find((price) => price.partId === part.partId);
  if (inBook) return { unitPrice: inBook.unitPrice, source: 'price_book' };
  if (overrides.markupBasisPoints != null) {
    const unitPrice = markedUp(part.unitCost, overrides.markupBasisPoints, edition.markup);
    return { unitPrice, source: 'client_markup' };
  }
  const basisPoints = bandFor(part, edition.markup);
  return { unitPrice: markedUp(part.unitCost, basisPoints, edition.markup), source: 'markup' };
}

function markedUp(unitCost: number, basisPoints: number, rule: MarkupRule): number {
  const tenThousandths = exact(unitCost) * (10_000n + exact(basisPoints));
  return roundToStep(tenThousandths, 10_000, rule.step, rule.rounding === 'up' ? 'up' : 'half_up');
}

function bandFor(part: PartToPrice, rule: MarkupRule): number {
  let band: MarkupRule['bands'][number] | undefined;
  for (const each of rule.bands) {
    if (each.fromUnitCost > part.unitCost) continue;
    if (!band || each.fromUnitCost > band.fromUnitCost) band = each;
  }
  if (!band) {
    const message = `The price book has no markup for the cost of ${part.description}`;
    throw new PriceBookGap('no_markup_band', message);
  }
  return band.basisPoints;
}
