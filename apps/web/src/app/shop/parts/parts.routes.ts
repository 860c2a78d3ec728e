import { type Routes } from '@angular/router';
import { keepsChanges } from '../../core/forms/unsaved-changes';
import { may } from '../../core/session/guards';

export const partsRoutes: Routes = [
  {
    path: '',
    title: 'Parts',
    loadComponent: () => import('./part-list').then((m) => m.PartList),
  },
  {
    path: 'new',
    title: 'Add a part',
    canActivate: [may('parts.change')],
    canDeactivate: [keepsChanges],
    loadComponent: () => import('./part-form').then((m) => m.PartForm),
  },
  {
    path: ':partId',
    title: 'Part',
    loadComponent: () => import('./part-page').then((m) => m.PartPage),
  },
  {
    path: ':partId/change',
    title: 'Change a part',
    canActivate: [may('parts.change')],
    canDeactivate: [keepsChanges],
    loadComponent: () => import('./part-form').then((m) => m.PartForm),
  },
];
