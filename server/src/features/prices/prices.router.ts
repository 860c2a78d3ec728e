import { handle } from '../../core/http/route';
import { createEdition, listEditions, showEdition, showInForce } from './editions';

export const pricesRoutes = [
  handle('editions.list', (context, { query }) => listEditions(context, query)),
  handle('editions.show', (context, { params }) => showEdition(context, params.editionId)),
  handle('prices.inForce', (context, { query }) => showInForce(context, query.on)),
  handle('editions.create', (context, { body }) => createEdition(context, body)),
];
