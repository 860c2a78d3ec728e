import { type Routes } from '@angular/router';
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
        loadComponent: () => import('./client-landing').then((m) => m.ClientLanding),
      },
      {
        path: '**',
        title: 'No such page',
        loadComponent: () => import('../core/pages/no-such-page').then((m) => m.NoSuchPage),
      },
    ],
  },
];
