import { type Routes } from '@angular/router';
import { keepsChanges } from '../../core/forms/unsaved-changes';
import { may } from '../../core/session/guards';

export const visitsRoutes: Routes = [
  {
    path: '',
    title: 'Visits',
    loadComponent: () => import('./visit-list').then((m) => m.VisitList),
  },
  {
    path: 'new',
    title: 'Plan a visit',
    canActivate: [may('visits.plan')],
    canDeactivate: [keepsChanges],
    loadComponent: () => import('./visit-form').then((m) => m.VisitForm),
  },
  {
    path: ':visitId',
    title: 'Visit',
    canDeactivate: [keepsChanges],
    loadComponent: () => import('./visit-page').then((m) => m.VisitPage),
  },
  {
    path: ':visitId/change',
    title: 'Change a visit',
    canActivate: [may('visits.plan')],
    canDeactivate: [keepsChanges],
    loadComponent: () => import('./visit-form').then((m) => m.VisitForm),
  },
  {
    path: ':visitId/ticket',
    title: 'Sign off a ticket',
    canActivate: [may('tickets.sign_off')],
    loadComponent: () => import('../tickets/sign-off-page').then((m) => m.SignOffPage),
  },
];
