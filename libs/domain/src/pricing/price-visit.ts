import { billedLabour } from './labour';
import { accessLines, labourLines } from './labour-lines';
import { partLine } from './part-lines';
import { tripLines } from './trip-lines';
import { type JobToPrice, type PricedLine, type VisitToPrice } from './visit';

/**
 * The lines of a visit at list value, job by job: its share of the trip, labour in normal hours and
 * after hours, access, parts. Who bears them, and the tax, come afterwards.
 *
 * The trip is shared evenly over the machines worked on, to the cent. Labour is billed as
 * `billedLabour` says. Parts from the store's own storeroom and salvaged ones stand at nothing.
 * A client's discount is taken off every line. A visit without a machine has no lines.
 *
 * @throws RangeError for minutes, quantities or amounts that are negative or not whole
 * @throws PriceBookGap when the edition has no trip rule or markup for it
 */
export function priceVisit(visit: VisitToPrice): PricedLine[] {
  visit.jobs.forEach(refuseNonsense);
  if (visit.jobs.length === 0) return [];
  const trips = tripLines(visit);
  const labour = billedLabour(visit.edition, visit.jobs);
  return visit.jobs.flatMap((job, i) => [
    ...trips.slice(i, i + 1),
    ...labourLines(visit, job, labour, i),
    ...accessLines(visit, job),
    ...job.parts.map((part) => partLine(visit, job, part)),
  ]);
}

function refuseNonsense(job: JobToPrice): void {
  const counts = [job.minutes, job.afterHoursMinutes, job.accessMinutes, job.labourCostPerHour];
  const amounts = job.parts.flatMap((part) => [part.unitCost, part.fixedPrice ?? 0]);
  for (const value of [...counts, ...amounts]) {
    if (!Number.isSafeInteger(value) || value < 0) {
      throw new RangeError(`Job ${job.jobId}: not a whole number of at least 0: ${value}`);
    }
  }
  for (const { quantityMilli } of job.parts) {
    if (!Number.isSafeInteger(quantityMilli) || quantityMilli < 1) {
      throw new RangeError(`Job ${job.jobId}: not a quantity: ${quantityMilli}`);
    }
  }
}
