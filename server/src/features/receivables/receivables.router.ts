import { handle } from '../../core/http/route';
import { listBalances, listReceivables } from './read-receivables';

export const receivablesRoutes = [
  handle('balances.list', (context, { query }) => listBalances(context, query)),
  handle('receivables.list', (context, { query }) => listReceivables(context, query)),
];
