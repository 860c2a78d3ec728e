import { type Routes } from '@angular/router';

export const importsRoutes: Routes = [
  {
    path: '',
    title: 'Import',
    loadComponent: () => import('./import-start').then((m) => m.ImportStart),
  },
  {
    path: ':importId',
    title: 'Import',
    loadComponent: () => import('./import-page').then((m) => m.ImportPage),
  },
];
