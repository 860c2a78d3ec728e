import { handle } from '../../core/http/route';
import { decideDelivery, listDeliveries } from './deliveries';

export const deliveriesRoutes = [
  handle('deliveries.list', (context, { query }) => listDeliveries(context, query)),
  handle('deliveries.decide', (context, { params, version, body }) =>
    decideDelivery(context, params.deliveryId, version, body.decision),
  ),
];
