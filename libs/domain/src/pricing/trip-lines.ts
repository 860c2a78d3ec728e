import { formatMoney } from '../money/amount';
import { share } from '../money/share';
import { discountOff, discountReason } from './line';
import { tripRuleFor } from './trip';
import { type PricedLine, type VisitToPrice } from './visit';

/** One trip line per job, in their order: even shares, to the cent. */
export function tripLines(visit: VisitToPrice): PricedLine[] {
  const { edition, jobs, overrides, currency, locale = 'en' } = visit;
  const bears = jobs.map(
    (job) => job.result !== 'nothing_found' || edition.nothingFound !== 'free',
  );
  const machines = bears.filter(Boolean).length;
  const agreed = overrides?.tripAmount;
  const rule =
    agreed == null
      ? tripRuleFor(edition.trips, visit.store)
      : { label: 'agreed with the client', amount: agreed };
  const prices = machines === 0 ? jobs.map(() => 0) : share(rule.amount, bears.map(Number));
  const whole = discountOff(visit, machines === 0 ? 0 : rule.amount);
  const discounts = whole === 0 ? jobs.map(() => 0) : share(whole, prices);
  const costs = share(
    visit.tripCost,
    jobs.map(() => 1),
  );
  const name = `Trip (${rule.label}): ${formatMoney(rule.amount, currency, locale)}`;
  return jobs.map((job, i) => {
    const unitPrice = prices[i] ?? 0;
    const discount = discounts[i] ?? 0;
    return {
      lineKey: `job:${job.jobId}:trip`,
      jobId: job.jobId,
      kind: 'trip',
      description: machines > 1 ? `Trip, shared over ${machines} machines` : 'Trip',
      unit: 'each',
      quantityMilli: 1_000,
      unitPrice,
      discount,
      list: unitPrice - discount,
      cost: costs[i] ?? 0,
      reasons: [
        !bears[i]
          ? 'Nothing found: free by the shop’s rule, no share of the trip'
          : machines > 1
            ? `${name}, shared over ${machines} machines`
            : name,
        ...discountReason(visit, discount),
      ],
    };
  });
}
