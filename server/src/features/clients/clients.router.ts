import { handle } from '../../core/http/route';
import { listClients, showClient } from './read-clients';
import { changeClient, createClient, endClient, resumeClient } from './write-clients';

export const clientsRoutes = [
  handle('clients.list', (context, { query }) => listClients(context, query)),
  handle('clients.show', (context, { params }) => showClient(context, params.clientId)),
  handle('clients.create', (context, { body }) => createClient(context, body)),
  handle('clients.change', (context, { params, version, body }) =>
    changeClient(context, params.clientId, version, body),
  ),
  handle('clients.end', (context, { params, version }) =>
    endClient(context, params.clientId, version),
  ),
  handle('clients.resume', (context, { params, version }) =>
    resumeClient(context, params.clientId, version),
  ),
];
