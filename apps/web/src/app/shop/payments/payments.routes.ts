import { type Routes } from '@angular/router';
import { keepsChanges } from '../../core/forms/unsaved-changes';
import { may } from '../../core/session/guards';

export const paymentsRoutes: Routes = [
  {
    path: '',
    title: 'Payments',
    loadComponent: () => import('./payment-list').then((m) => m.PaymentList),
  },
  {
    path: 'new',
    title: 'Record a payment',
    canActivate: [may('payments.record')],
    canDeactivate: [keepsChanges],
    loadComponent: () => import('./payment-form').then((m) => m.PaymentForm),
  },
  {
    path: ':paymentId',
    title: 'Payment',
    loadComponent: () => import('./payment-page').then((m) => m.PaymentPage),
  },
];
