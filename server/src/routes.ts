import { type Route } from './core/http/route';
import { clientsRoutes } from './features/clients/clients.router';
import { contactsRoutes } from './features/contacts/contacts.router';
import { liveRoutes } from './features/live/live.router';
import { machinesRoutes } from './features/machines/machines.router';
import { partsRoutes } from './features/parts/parts.router';
import { pricesRoutes } from './features/prices/prices.router';
import { settingsRoutes } from './features/settings/settings.router';
import { storesRoutes } from './features/stores/stores.router';

/** Every route of the API, a line a feature. */
export const routes: Route[] = [
  ...clientsRoutes,
  ...contactsRoutes,
  ...liveRoutes,
  ...machinesRoutes,
  ...partsRoutes,
  ...pricesRoutes,
  ...settingsRoutes,
  ...storesRoutes,
];
