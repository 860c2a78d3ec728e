import { type Routes } from '@angular/router';

export const contractsRoutes: Routes = [
  {
    path: '',
    title: 'Contracts',
    loadComponent: () => import('./contract-list').then((m) => m.ContractList),
  },
  {
    path: ':contractId',
    title: 'Contract',
    loadComponent: () => import('./contract-page').then((m) => m.ContractPage),
  },
];
