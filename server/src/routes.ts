import { type Route } from './core/http/route';
import { accountRoutes } from './features/account/account.router';
import { crewRoutes } from './features/crew/crew.router';
import { invitationsRoutes } from './features/invitations/invitations.router';
import { sessionRoutes } from './features/session/session.router';
import { signUpRoutes } from './features/sign-up/sign-up.router';
import { clientsRoutes } from './features/clients/clients.router';
import { contactsRoutes } from './features/contacts/contacts.router';
import { exportsRoutes } from './features/exports/exports.router';
import { filesRoutes } from './features/files/files.router';
import { importsRoutes } from './features/imports/imports.router';
import { liveRoutes } from './features/live/live.router';
import { machinesRoutes } from './features/machines/machines.router';
import { partsRoutes } from './features/parts/parts.router';
import { platformAreaRoutes } from './features/platform/platform.router';
import { pricesRoutes } from './features/prices/prices.router';
import { settingsRoutes } from './features/settings/settings.router';
import { storesRoutes } from './features/stores/stores.router';
import { subscriptionRoutes } from './features/subscription/subscription.router';
import { callsRoutes } from './features/calls/calls.router';
import { rulingsRoutes } from './features/rulings/rulings.router';
import { ticketsRoutes } from './features/tickets/tickets.router';
import { contractsRoutes } from './features/contracts/contracts.router';
import { deliveriesRoutes } from './features/deliveries/deliveries.router';
import { ledgerRoutes } from './features/ledger/ledger.router';
import { paymentsRoutes } from './features/payments/payments.router';
import { receivablesRoutes } from './features/receivables/receivables.router';
import { statementsRoutes } from './features/statements/statements.router';
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
  ...exportsRoutes,
  ...filesRoutes,
  ...importsRoutes,
  ...liveRoutes,
  ...machinesRoutes,
  ...partsRoutes,
  ...platformAreaRoutes,
  ...pricesRoutes,
  ...settingsRoutes,
  ...storesRoutes,
  ...subscriptionRoutes,
  ...callsRoutes,
  ...rulingsRoutes,
  ...ticketsRoutes,
  ...contractsRoutes,
  ...deliveriesRoutes,
  ...ledgerRoutes,
  ...paymentsRoutes,
  ...receivablesRoutes,
  ...statementsRoutes,
  ...visitsRoutes,
];
