import { type Routes } from '@angular/router';
import { keepsChanges } from '../../core/forms/unsaved-changes';
import { may } from '../../core/session/guards';

export const priceBookRoutes: Routes = [
  {
    path: '',
    title: 'Price book',
    loadComponent: () => import('./edition-list').then((m) => m.EditionList),
  },
  {
    path: 'new',
    title: 'New edition of the price book',
    canActivate: [may('prices.change')],
    canDeactivate: [keepsChanges],
    loadComponent: () => import('./edition-form').then((m) => m.EditionForm),
  },
  {
    path: ':editionId',
    title: 'Edition of the price book',
    loadComponent: () => import('./edition-page').then((m) => m.EditionPage),
  },
];
