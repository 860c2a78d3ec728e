import { type Routes } from '@angular/router';
import { keepsChanges } from '../../core/forms/unsaved-changes';
import { may } from '../../core/session/guards';

export const storesRoutes: Routes = [
  {
    path: '',
    title: 'Stores',
    loadComponent: () => import('./store-list').then((m) => m.StoreList),
  },
  {
    path: 'new',
    title: 'Add a store',
    canActivate: [may('clients.change')],
    canDeactivate: [keepsChanges],
    loadComponent: () => import('./store-form').then((m) => m.StoreForm),
  },
  {
    path: ':storeId',
    title: 'Store',
    canDeactivate: [keepsChanges],
    loadComponent: () => import('./store-page').then((m) => m.StorePage),
  },
  {
    path: ':storeId/change',
    title: 'Change a store',
    canActivate: [may('clients.change')],
    canDeactivate: [keepsChanges],
    loadComponent: () => import('./store-form').then((m) => m.StoreForm),
  },
  {
    path: ':storeId/machines/new',
    title: 'Add a machine',
    canActivate: [may('machines.change')],
    canDeactivate: [keepsChanges],
    loadComponent: () => import('../machines/machine-form').then((m) => m.MachineForm),
  },
  {
    path: ':storeId/machines/several',
    title: 'Add several machines',
    canActivate: [may('machines.change')],
    canDeactivate: [keepsChanges],
    loadComponent: () => import('../machines/several-machines').then((m) => m.SeveralMachines),
  },
];
