import { ticketPostings, tradeDayOf } from '@lib/domain';
import { v7 as uuid } from 'uuid';
import { record } from '../../core/audit';
import { type Context } from '../../core/context';
import { nextNumber } from '../../core/counters';
import { row, withTenant, write } from '../../core/database/tenancy';
import { type AnswerOf } from '../../core/http/route';
import { enqueue } from '../../core/jobs/boss';
import { announce } from '../../core/live/live';
import { found, problem } from '../../core/problems/problem';
import { postDocument } from '../ledger/post';
import { storedRulings } from '../rulings/decisions';
import { storeProposals } from '../rulings/propose-rulings';
import { ruledVisit, type RuledVisit } from '../rulings/show-rulings';
import { ticketName } from '../statements/document-names';
import { settleCalls } from '../visits/visit-calls';
import { billVisit, blockers, type TicketLine } from './bill-visit';
import { showTicket } from './read-tickets';

type Billed = ReturnType<typeof billVisit>;

/**
 * Signs off the ticket of a completed visit: numbered without gaps, posted, and never changed again.
 * The visit's row is locked, so that a second sign-off finds the ticket of the first.
 */
export function signOff(
  context: Context,
  visitId: string,
  total?: number,
): Promise<AnswerOf<'tickets.signOff'>> {
  return withTenant(context, async () => {
    await refuseSignedOff(context, visitId);
    const ruled = await ruledVisit(context, visitId);
    const [blocker] = blockers(ruled);
    if (blocker) throw problem('conflict', blocker);
    const billed = billVisit(ruled);
    if (total !== undefined && total !== billed.totals.total) {
      throw problem('conflict', 'The total is another one by now: look at the ticket again.');
    }
    await storeProposals(context, ruled, await storedRulings(context, visitId));
    const ticket = {
      id: uuid(),
      signedOffOn: tradeDayOf(context.now.toISOString(), ruled.shop.zone),
      number: await nextNumber(context, 'ticket'),
    };
    await insertTicket(context, ruled, billed, ticket);
    await insertLines(context, ruled, billed.lines, ticket.id);
    await write(
      'update visits set ticket_id = $ticketId where shop_id = $shopId and id = $visitId',
      {
        shopId: context.shopId,
        visitId,
        ticketId: ticket.id,
      },
    );
    await settleCalls(context, { id: visitId, clientId: ruled.visit.clientId });
    await postDocument(context, {
      kind: 'ticket',
      id: ticket.id,
      clientId: ruled.visit.clientId,
      postedOn: ticket.signedOffOn,
      postings: ticketPostings({
        storeId: ruled.visit.storeId,
        tax: billed.totals.tax,
        lines: billed.lines.map((line) => ({ ...line, ownCost: line.cost })),
      }),
    });
    await enqueue('warranty-absorb', { shopId: context.shopId, ticketId: ticket.id });
    await record(context, `ticket ${ticketName(ticket.number)} signed off`, {
      kind: 'ticket',
      id: ticket.id,
    });
    await announce(context, 'ticket', ticket.id, ruled.visit.clientId);
    await announce(context, 'visit', visitId, ruled.visit.clientId);
    return showTicket(context, ticket.id);
  });
}

async function refuseSignedOff(context: Context, visitId: string): Promise<void> {
  const visit = found(
    await row<{ ticketId: string | null }>(
      `select ticket_id as "ticketId" from visits
       where shop_id = $shopId and id = $visitId for update`,
      { shopId: context.shopId, visitId },
    ),
  );
  if (visit.ticketId === null) return;
  const ticket = await row<{ number: number }>(
    'select number from tickets where shop_id = $shopId and id = $ticketId',
    { shopId: context.shopId, ticketId: visit.ticketId },
  );
  const name = ticketName(ticket?.number ?? 0);
  throw problem('conflict', `The visit is signed off already, as ticket ${name}.`);
}

async function insertTicket(
  context: Context,
  { visit, shop, edition }: RuledVisit,
  { totals }: Billed,
  ticket: { id: string; number: number; signedOffOn: string },
): Promise<void> {
  await write(
    `insert into tickets (shop_id, id, client_id, store_id, visit_id, number, signed_off_on,
       signed_off_at, signed_off_by, edition_id, currency, list, net, tax, total, borne_by_shop,
       own_cost)
     values ($shopId, $id, $clientId, $storeId, $visitId, $number, $signedOffOn, $now, $userId,
       $editionId, $currency, $list, $net, $tax, $total, $borneByShop, $ownCost)`,
    {
      shopId: context.shopId,
      ...ticket,
      clientId: visit.clientId,
      storeId: visit.storeId,
      visitId: visit.id,
      now: context.now,
      userId: context.userId,
      editionId: edition.id,
      currency: shop.currency,
      list: totals.list,
      net: totals.net,
      tax: totals.tax,
      total: totals.total,
      borneByShop: totals.absorbed.shop + totals.absorbed.goodwill,
      ownCost: totals.absorbedCost.shop + totals.absorbedCost.goodwill,
    },
  );
}

async function insertLines(
  context: Context,
  { visit }: RuledVisit,
  lines: readonly (TicketLine & { charged: number; tax: number; taxBasisPoints: number })[],
  ticketId: string,
): Promise<void> {
  const values = lines.map((line, index) => ({
    id: uuid(),
    job_id: line.jobId,
    position: index + 1,
    line_key: line.lineKey,
    kind: line.kind,
    description: line.description,
    unit: line.unit,
    quantity_milli: line.quantityMilli,
    unit_price: line.unitPrice,
    discount: line.discount,
    bearer: line.bearer,
    list: line.list,
    charged: line.charged,
    tax_basis_points: line.taxBasisPoints,
    tax: line.tax,
    cost: line.cost,
    price_reasons: line.reasons,
    reasons: line.rulingReasons,
    decision: line.decision,
  }));
  const columns = Object.keys(values[0] ?? {});
  if (columns.length === 0) return;
  await write(
    `insert into ticket_lines (shop_id, client_id, ticket_id, ${columns.join(', ')})
     select $shopId, $clientId, $ticketId, ${columns.map((column) => `l.${column}`).join(', ')}
     from jsonb_populate_recordset(null::ticket_lines, $lines::jsonb) l`,
    {
      shopId: context.shopId,
      clientId: visit.clientId,
      ticketId,
      lines: JSON.stringify(values),
    },
  );
}
