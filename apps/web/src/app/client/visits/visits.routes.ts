import { type Routes } from '@angular/router';

export const visitsRoutes: Routes = [
  {
    path: '',
    title: 'Visits',
    loadComponent: () => import('./visit-list').then((m) => m.VisitList),
  },
  {
    path: ':visitId',
    title: 'Visit',
    loadComponent: () => import('./visit-page').then((m) => m.VisitPage),
  },
];
