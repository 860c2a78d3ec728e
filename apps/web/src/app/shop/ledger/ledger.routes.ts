import { type Routes } from '@angular/router';

export const ledgerRoutes: Routes = [
  {
    path: '',
    title: 'Ledger',
    loadComponent: () => import('./ledger-page').then((m) => m.LedgerPage),
  },
];
