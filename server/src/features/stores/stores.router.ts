import { handle } from '../../core/http/route';
import { showFloor } from './floor';
import { listStores, showStore } from './read-stores';
import { changeStore, createStore, endStore, resumeStore } from './write-stores';

export const storesRoutes = [
  handle('stores.list', (context, { query }) => listStores(context, query)),
  handle('stores.show', (context, { params }) => showStore(context, params.storeId)),
  handle('stores.floor', (context, { params }) => showFloor(context, params.storeId)),
  handle('stores.create', (context, { body }) => createStore(context, body)),
  handle('stores.change', (context, { params, version, body }) =>
    changeStore(context, params.storeId, version, body),
  ),
  handle('stores.end', (context, { params, version }) =>
    endStore(context, params.storeId, version),
  ),
  handle('stores.resume', (context, { params, version }) =>
    resumeStore(context, params.storeId, version),
  ),
];
