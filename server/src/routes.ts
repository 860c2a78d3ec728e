import { type Route } from './core/http/route';
import { accountRoutes } from './features/account/account.router';
import { crewRoutes } from './features/crew/crew.router';
import { invitationsRoutes } from './features/invitations/invitations.router';
import { sessionRoutes } from './features/session/session.router';
import { signUpRoutes } from './features/sign-up/sign-up.router';
import { clientsRoutes } from './features/clients/clients.router';
import { contactsRoutes } from './features/contacts/contacts.router';
import { filesRoutes } from './features/files/files.router';
import { liveRoutes } from './features/live/live.router';
import { machinesRoutes } from './features/machines/machines.router';
import { partsRoutes } from './features/parts/parts.router';
import { pricesRoutes } from './features/prices/prices.router';
import { settingsRoutes } from './features/settings/settings.router';
import { storesRoutes } from './features/stores/stores.router';
import { callsRoutes } from './features/calls/calls.router';
import { rulingsRoutes } from './features/rulings/rulings.router';
import { ticketsRoutes } from './features/tickets/tickets.router';
import { visitsRoutes } from './features/visits/visits.router';

/** Every route of the API, a line a feature. */
export const routes: Route[] = [
  ...accountRoutes,
  ...crewRoutes,
  ...invitationsRoutes,
  ...sessionRoutes,
  ...signUpRoutes,
  ...clientsRoutes,
  ...contactsRoutes,
  ...filesRoutes,
  ...liveRoutes,
  ...machinesRoutes,
  ...partsRoutes,
  ...pricesRoutes,
  ...settingsRoutes,
  ...storesRoutes,
  ...callsRoutes,
  ...rulingsRoutes,
  ...ticketsRoutes,
  ...visitsRoutes,
];
