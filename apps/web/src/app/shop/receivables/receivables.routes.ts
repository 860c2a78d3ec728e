import { type Routes } from '@angular/router';

export const receivablesRoutes: Routes = [
  {
    path: '',
    title: 'Receivables',
    loadComponent: () => import('./ageing-list').then((m) => m.AgeingList),
  },
];
