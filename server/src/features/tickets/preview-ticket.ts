import { type Context } from '../../core/context';
import { withTenant } from '../../core/database/tenancy';
import { type AnswerOf } from '../../core/http/route';
import { problem } from '../../core/problems/problem';
import { ruledVisit } from '../rulings/show-rulings';
import { billVisit, blockers } from './bill-visit';
import { jobsOfTicket, shownReason } from './read-lines';

/** What the ticket of a visit would say if it were signed off now. Nothing is written. */
export function previewTicket(
  context: Context,
  visitId: string,
): Promise<AnswerOf<'tickets.preview'>> {
  return withTenant(context, async () => {
    const ruled = await ruledVisit(context, visitId);
    if (ruled.visit.ticketId !== null) throw problem('conflict', 'The ticket is signed off.');
    const { lines, totals } = billVisit(ruled);
    const shown = lines.map((line, index) => ({
      position: index + 1,
      jobId: line.jobId,
      lineKey: line.lineKey,
      kind: line.kind,
      description: line.description,
      unit: line.unit,
      quantityMilli: line.quantityMilli,
      unitPrice: line.unitPrice,
      discount: line.discount,
      bearer: line.bearer,
      list: line.list,
      charged: line.charged,
      taxBasisPoints: line.taxBasisPoints,
      tax: line.tax,
      priceReasons: line.reasons,
      shop: {
        cost: line.cost,
        reasons: line.rulingReasons.map(shownReason),
        decision: line.decision,
      },
    }));
    return {
      visitId,
      visitNumber: ruled.visit.number,
      currency: ruled.shop.currency,
      jobs: await jobsOfTicket(context, visitId, shown),
      blockers: blockers(ruled),
      list: totals.list,
      net: totals.net,
      tax: totals.tax,
      total: totals.total,
      absorbed: totals.absorbed,
      borneByShop: totals.absorbed.shop + totals.absorbed.goodwill,
    };
  });
}
