import { type Routes } from '@angular/router';
import { keepsChanges } from '../../core/forms/unsaved-changes';
import { may } from '../../core/session/guards';

export const contractsRoutes: Routes = [
  {
    path: '',
    title: 'Contracts',
    loadComponent: () => import('./contract-list').then((m) => m.ContractList),
  },
  {
    path: 'new',
    title: 'Agree a contract',
    canActivate: [may('contracts.change')],
    canDeactivate: [keepsChanges],
    loadComponent: () => import('./contract-form').then((m) => m.ContractForm),
  },
  {
    path: 'rounds',
    title: 'Rounds',
    loadComponent: () => import('./round-list').then((m) => m.RoundList),
  },
  {
    path: 'closed-days',
    title: 'Closed days',
    canActivate: [may('settings.read')],
    canDeactivate: [keepsChanges],
    loadComponent: () => import('./closed-days').then((m) => m.ClosedDays),
  },
  {
    path: ':contractId',
    title: 'Contract',
    canDeactivate: [keepsChanges],
    loadComponent: () => import('./contract-page').then((m) => m.ContractPage),
  },
  {
    path: ':contractId/change',
    title: 'Change a contract',
    canActivate: [may('contracts.change')],
    canDeactivate: [keepsChanges],
    loadComponent: () => import('./contract-form').then((m) => m.ContractForm),
  },
];
