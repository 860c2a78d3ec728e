import { multiplyDivide } from '../money/rounding';
import { priced } from './line';
import { type PartPriceSource, partUnitPrice } from './part-price';
import { type JobToPrice, type PartToPrice, type PricedLine, type VisitToPrice } from './visit';

const partReasons: Readonly<Record<PartPriceSource, string>> = {
  agreed: 'Price agreed for this part',
  price_book: 'Price fixed in the price book',
  client_markup: 'Price by the client’s markup',
  markup: 'Price by the price book’s markup',
};

export function partLine(visit: VisitToPrice, job: JobToPrice, part: PartToPrice): PricedLine {
  const line = {
    lineKey: `job:${job.jobId}:part:${part.partUseId}`,
    jobId: job.jobId,
    kind: 'part',
    description: part.description,
    unit: 'each',
    quantityMilli: part.quantityMilli,
  } as const;
  const cost = multiplyDivide(part.unitCost, part.quantityMilli, 1_000);
  if (part.source === 'storeroom') {
    const reasons = ['From the store’s own storeroom: recorded, not charged'];
    return priced(visit, { ...line, unitPrice: 0, cost: 0, reasons });
  }
  if (part.source === 'salvaged') {
    return priced(visit, { ...line, unitPrice: 0, cost, reasons: ['Salvaged: not charged'] });
  }
  const { unitPrice, source } = partUnitPrice(part, visit.edition, visit.overrides ?? {});
  return priced(visit, { ...line, unitPrice, cost, reasons: [partReasons[source]] });
}
