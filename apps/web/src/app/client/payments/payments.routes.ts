import { type Routes } from '@angular/router';

export const paymentsRoutes: Routes = [
  {
    path: '',
    title: 'Payments',
    loadComponent: () => import('./payment-list').then((m) => m.PaymentList),
  },
  {
    path: ':paymentId',
    title: 'Payment',
    loadComponent: () => import('./payment-page').then((m) => m.PaymentPage),
  },
];
