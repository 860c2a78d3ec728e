import { type Routes } from '@angular/router';
import { may } from '../core/session/guards';
import { ShopFrame } from './shop-frame';

export const shopRoutes: Routes = [
  {
    path: '',
    component: ShopFrame,
    children: [
      { path: '', pathMatch: 'full', redirectTo: 'today' },
      {
        path: 'today',
        title: 'Today',
        loadComponent: () => import('./today/today-page').then((m) => m.TodayPage),
      },
      {
        path: 'set-up',
        title: 'Set up the shop',
        canActivate: [may('settings.change')],
        loadComponent: () => import('./set-up/set-up-page').then((m) => m.SetUpPage),
      },
      {
        path: 'calls',
        canActivate: [may('calls.read')],
        loadChildren: () => import('./calls/calls.routes').then((m) => m.callsRoutes),
      },
      {
        path: 'visits',
        canActivate: [may('visits.read')],
        loadChildren: () => import('./visits/visits.routes').then((m) => m.visitsRoutes),
      },
      {
        path: 'day-sheet',
        title: 'Day sheet',
        canActivate: [may('visits.plan')],
        loadComponent: () => import('./day-sheet/day-sheet-page').then((m) => m.DaySheetPage),
      },
      {
        path: 'rulings',
        canActivate: [may('rulings.read')],
        loadChildren: () => import('./rulings/rulings.routes').then((m) => m.rulingsRoutes),
      },
      {
        path: 'tickets',
        canActivate: [may('tickets.read')],
        loadChildren: () => import('./tickets/tickets.routes').then((m) => m.ticketsRoutes),
      },
      {
        path: 'clients',
        loadChildren: () => import('./clients/clients.routes').then((m) => m.clientsRoutes),
      },
      {
        path: 'stores',
        loadChildren: () => import('./stores/stores.routes').then((m) => m.storesRoutes),
      },
      {
        path: 'machines',
        loadChildren: () => import('./machines/machines.routes').then((m) => m.machinesRoutes),
      },
      {
        path: 'contacts',
        loadChildren: () => import('./contacts/contacts.routes').then((m) => m.contactsRoutes),
      },
      {
        path: 'imports',
        canActivate: [may('imports.run')],
        loadChildren: () => import('./imports/imports.routes').then((m) => m.importsRoutes),
      },
      {
        path: 'price-book',
        loadChildren: () => import('./price-book/price-book.routes').then((m) => m.priceBookRoutes),
      },
      {
        path: 'parts',
        loadChildren: () => import('./parts/parts.routes').then((m) => m.partsRoutes),
      },
      {
        path: 'crew',
        loadChildren: () => import('./crew/crew.routes').then((m) => m.crewRoutes),
      },
      {
        path: 'settings',
        canActivate: [may('settings.read')],
        loadChildren: () => import('./settings/settings.routes').then((m) => m.settingsRoutes),
      },
      {
        path: 'month-close',
        canActivate: [may('statements.close')],
        loadChildren: () =>
          import('./month-close/month-close.routes').then((m) => m.monthCloseRoutes),
      },
      {
        path: 'statements',
        canActivate: [may('statements.read')],
        loadChildren: () =>
          import('./statements/statements.routes').then((m) => m.statementsRoutes),
      },
      {
        path: 'payments',
        canActivate: [may('payments.read')],
        loadChildren: () => import('./payments/payments.routes').then((m) => m.paymentsRoutes),
      },
      {
        path: 'receivables',
        canActivate: [may('ledger.read')],
        loadChildren: () =>
          import('./receivables/receivables.routes').then((m) => m.receivablesRoutes),
      },
      {
        path: 'ledger',
        canActivate: [may('ledger.read')],
        loadChildren: () => import('./ledger/ledger.routes').then((m) => m.ledgerRoutes),
      },
      {
        path: 'contracts',
        canActivate: [may('contracts.read')],
        loadChildren: () => import('./contracts/contracts.routes').then((m) => m.contractsRoutes),
      },
      {
        path: 'mails',
        canActivate: [may('deliveries.read')],
        loadChildren: () =>
          import('./deliveries/deliveries.routes').then((m) => m.deliveriesRoutes),
      },
      {
        path: 'subscription',
        canActivate: [may('subscription.read')],
        loadChildren: () =>
          import('./subscription/subscription.routes').then((m) => m.subscriptionRoutes),
      },
      {
        path: '**',
        title: 'No such page',
        loadComponent: () => import('../core/pages/no-such-page').then((m) => m.NoSuchPage),
      },
    ],
  },
];
