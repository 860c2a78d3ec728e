import { handle } from '../../core/http/route';
import { previewTicket } from './preview-ticket';
import { listTickets, showTicket } from './read-tickets';
import { signOff } from './sign-off';

export const ticketsRoutes = [
  handle('tickets.preview', (context, { params }) => previewTicket(context, params.visitId)),
  handle('tickets.signOff', (context, { params, body }) =>
    signOff(context, params.visitId, body.total),
  ),
  handle('tickets.list', (context, { query }) => listTickets(context, query)),
  handle('tickets.show', (context, { params }) => showTicket(context, params.ticketId)),
];
