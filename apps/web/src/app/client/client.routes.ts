import { type Routes } from '@angular/router';
import { may } from '../core/session/guards';
import { ClientFrame } from './client-frame';

export const clientRoutes: Routes = [
  {
    path: '',
    component: ClientFrame,
    children: [
      { path: '', pathMatch: 'full', redirectTo: 'home' },
      {
        path: 'home',
        title: 'Home',
        loadComponent: () => import('./home/home-page').then((m) => m.HomePage),
      },
      {
        path: 'machines',
        loadChildren: () => import('./machines/machines.routes').then((m) => m.machinesRoutes),
      },
      {
        path: 'calls',
        loadChildren: () => import('./calls/calls.routes').then((m) => m.callsRoutes),
      },
      {
        path: 'visits',
        loadChildren: () => import('./visits/visits.routes').then((m) => m.visitsRoutes),
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
        path: 'contracts',
        canActivate: [may('contracts.read')],
        loadChildren: () => import('./contracts/contracts.routes').then((m) => m.contractsRoutes),
      },
      {
        path: '**',
        title: 'No such page',
        loadComponent: () => import('../core/pages/no-such-page').then((m) => m.NoSuchPage),
      },
    ],
  },
];
