import { type Routes } from '@angular/router';
import { keepsChanges } from '../../core/forms/unsaved-changes';
import { may } from '../../core/session/guards';

export const clientsRoutes: Routes = [
  {
    path: '',
    title: 'Clients',
    loadComponent: () => import('./client-list').then((m) => m.ClientList),
  },
  {
    path: 'new',
    title: 'Add a client',
    canActivate: [may('clients.change')],
    canDeactivate: [keepsChanges],
    loadComponent: () => import('./client-form').then((m) => m.ClientForm),
  },
  {
    path: ':clientId',
    title: 'Client',
    canDeactivate: [keepsChanges],
    loadComponent: () => import('./client-page').then((m) => m.ClientPage),
  },
  {
    path: ':clientId/change',
    title: 'Change a client',
    canActivate: [may('clients.change')],
    canDeactivate: [keepsChanges],
    loadComponent: () => import('./client-form').then((m) => m.ClientForm),
  },
];
