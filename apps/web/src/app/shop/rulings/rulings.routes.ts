import { type Routes } from '@angular/router';
import { keepsChanges } from '../../core/forms/unsaved-changes';

export const rulingsRoutes: Routes = [
  {
    path: '',
    title: 'Rulings',
    loadComponent: () => import('./waiting-list').then((m) => m.WaitingList),
  },
  {
    path: ':visitId',
    title: 'Ruling',
    canDeactivate: [keepsChanges],
    loadComponent: () => import('./ruling-page').then((m) => m.RulingPage),
  },
];
