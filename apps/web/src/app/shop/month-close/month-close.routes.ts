import { type Routes } from '@angular/router';

export const monthCloseRoutes: Routes = [
  {
    path: '',
    title: 'Month close',
    loadComponent: () => import('./month-close-page').then((m) => m.MonthClosePage),
  },
];
