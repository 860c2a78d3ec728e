import { partUnitPrice } from '@lib/domain/pricing/part-price';
import { type PriceBook } from './price-book-api';

/**
 * What a part of this cost is sold for by a book, to show what its markup comes to; undefined while
 * the book is not written to the end.
 */
export function soldFor(unitCost: number, book: PriceBook): number | undefined {
  try {
    return partUnitPrice(
      {
        partUseId: '',
        description: '',
        quantityMilli: 1000,
        unitCost,
        source: 'shelf',
      },
      { ...book, partPrices: [] },
      {},
    ).unitPrice;
  } catch {
    return undefined;
  }
}
