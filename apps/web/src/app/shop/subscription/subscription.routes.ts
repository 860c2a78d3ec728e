import { type Routes } from '@angular/router';
import { keepsChanges } from '../../core/forms/unsaved-changes';
import { may } from '../../core/session/guards';

export const subscriptionRoutes: Routes = [
  {
    path: '',
    title: 'Subscription',
    canDeactivate: [keepsChanges],
    loadComponent: () => import('./subscription-page').then((m) => m.SubscriptionPage),
  },
  {
    path: 'audit',
    title: 'Who did what',
    canActivate: [may('audit.read')],
    loadComponent: () => import('./audit-list').then((m) => m.AuditList),
  },
];
