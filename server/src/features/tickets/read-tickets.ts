import { type Context } from '../../core/context';
import { type Bind, row, withTenant } from '../../core/database/tenancy';
import { type AnswerOf, type InputOf } from '../../core/http/route';
import { filtered } from '../../core/lists/filtered';
import { page, searched } from '../../core/lists/keyset';
import { found } from '../../core/problems/problem';
import { ownClient } from '../stores/own-store';
import { absorbedOf, jobsOfTicket, linesOfTicket } from './read-lines';
import {
  presentTicket,
  ticketFrom,
  type TicketItem,
  type TicketRow,
  ticketSelect,
} from './ticket-row';

export function listTickets(
  context: Context,
  query: InputOf<'tickets.list'>['query'],
): Promise<AnswerOf<'tickets.list'>> {
  return withTenant(context, () => {
    const bind: Bind = { shopId: context.shopId };
    const where = [
      't.shop_id = $shopId',
      ...ownClient(context, 't.client_id', bind),
      ...filtered(query, { clientId: 't.client_id', storeId: 't.store_id' }, bind),
      ...searched(query.q, ['t.number::text', 's.name', 'c.name'], bind),
    ];
    if (query.from) {
      bind.from = query.from;
      where.push('t.signed_off_on >= $from');
    }
    if (query.until) {
      bind.until = query.until;
      where.push('t.signed_off_on <= $until');
    }
    if (query.absorbed) {
      bind.absorbed = query.absorbed;
      where.push(`exists (select 1 from ticket_lines l where l.shop_id = t.shop_id
        and l.ticket_id = t.id and l.bearer = $absorbed)`);
    }
    return page<TicketRow, TicketItem>(
      {
        select: ticketSelect,
        from: ticketFrom,
        where,
        bind,
        sort: { column: 't.signed_off_on', type: 'date', descending: true },
        id: 't.id',
        limit: query.limit,
        cursor: query.cursor,
      },
      (ticket) => presentTicket(context, ticket),
    );
  });
}

export function showTicket(context: Context, ticketId: string): Promise<AnswerOf<'tickets.show'>> {
  return withTenant(context, async () => {
    const ticket = found(
      await row<TicketRow>(`${ticketSelect} where t.shop_id = $shopId and t.id = $ticketId`, {
        shopId: context.shopId,
        ticketId,
      }),
    );
    const lines = await linesOfTicket(context, ticketId);
    const ofShop = context.clientId === null;
    return {
      ...presentTicket(context, ticket),
      signedOffAt: ticket.signedOffAt.toISOString(),
      signedOffBy: ticket.signedOffBy,
      receivedBy: ticket.receivedBy,
      edition:
        ticket.editionNumber === null
          ? null
          : { id: ticket.editionId, number: ticket.editionNumber },
      jobs: await jobsOfTicket(context, ticket.visitId, lines),
      absorbed: absorbedOf(lines),
      absorbedPosted: ofShop ? ticket.absorbedPosted : null,
    };
  });
}
