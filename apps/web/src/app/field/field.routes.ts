import { type Routes } from '@angular/router';
import { FieldFrame } from './field-frame';

export const fieldRoutes: Routes = [
  {
    path: '',
    component: FieldFrame,
    children: [
      { path: '', pathMatch: 'full', redirectTo: 'day' },
      {
        path: 'day',
        title: 'Day',
        loadComponent: () => import('./field-landing').then((m) => m.FieldLanding),
      },
      {
        path: '**',
        title: 'No such page',
        loadComponent: () => import('../core/pages/no-such-page').then((m) => m.NoSuchPage),
      },
    ],
  },
];
