import { type Routes } from '@angular/router';
import { keepsChanges } from '../../core/forms/unsaved-changes';
import { may } from '../../core/session/guards';

export const callsRoutes: Routes = [
  {
    path: '',
    title: 'Calls',
    loadComponent: () => import('./call-list').then((m) => m.CallList),
  },
  {
    path: 'new',
    title: 'Take a call',
    canActivate: [may('calls.report')],
    canDeactivate: [keepsChanges],
    loadComponent: () => import('./call-form').then((m) => m.CallForm),
  },
  {
    path: ':callId',
    title: 'Call',
    canDeactivate: [keepsChanges],
    loadComponent: () => import('./call-page').then((m) => m.CallPage),
  },
];
