import { type Routes } from '@angular/router';
import { keepsChanges } from '../../core/forms/unsaved-changes';

export const callsRoutes: Routes = [
  {
    path: '',
    title: 'Calls',
    loadComponent: () => import('./call-list').then((m) => m.CallList),
  },
  {
    path: 'new',
    title: 'Report a fault',
    canDeactivate: [keepsChanges],
    loadComponent: () => import('./report-page').then((m) => m.ReportPage),
  },
  {
    path: ':callId',
    title: 'Call',
    loadComponent: () => import('./call-page').then((m) => m.CallPage),
  },
];
