import { type Routes } from '@angular/router';
import { keepsChanges } from '../../core/forms/unsaved-changes';
import { AccountFrame } from './account-frame';

export const accountRoutes: Routes = [
  {
    path: '',
    component: AccountFrame,
    children: [
      {
        path: '',
        pathMatch: 'full',
        title: 'Your account',
        canDeactivate: [keepsChanges],
        loadComponent: () => import('./account').then((m) => m.Account),
      },
    ],
  },
];
