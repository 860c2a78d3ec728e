import { type Routes } from '@angular/router';

export const deliveriesRoutes: Routes = [
  {
    path: '',
    title: 'Mails',
    loadComponent: () => import('./delivery-list').then((m) => m.DeliveryList),
  },
];
