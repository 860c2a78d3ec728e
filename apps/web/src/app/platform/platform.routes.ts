import { type Routes } from '@angular/router';
import { keepsChanges } from '../core/forms/unsaved-changes';
import { may } from '../core/session/guards';
import { PlatformFrame } from './platform-frame';

export const platformRoutes: Routes = [
  {
    path: '',
    component: PlatformFrame,
    children: [
      { path: '', pathMatch: 'full', redirectTo: 'shops' },
      {
        path: 'shops',
        title: 'Shops',
        loadComponent: () => import('./shops/shop-list').then((m) => m.ShopList),
      },
      {
        path: 'shops/:shopId',
        title: 'Shop',
        canDeactivate: [keepsChanges],
        loadComponent: () => import('./shops/shop-page').then((m) => m.ShopPage),
      },
      {
        path: 'plans',
        title: 'Plans',
        loadComponent: () => import('./plans/plan-list').then((m) => m.PlanList),
      },
      {
        path: 'plans/new',
        title: 'Add a plan',
        canActivate: [may('platform.change')],
        canDeactivate: [keepsChanges],
        loadComponent: () => import('./plans/plan-form').then((m) => m.PlanForm),
      },
      {
        path: 'plans/:planId/change',
        title: 'Change a plan',
        canActivate: [may('platform.change')],
        canDeactivate: [keepsChanges],
        loadComponent: () => import('./plans/plan-form').then((m) => m.PlanForm),
      },
      {
        path: 'queues',
        title: 'Queues',
        loadComponent: () => import('./watch/queue-list').then((m) => m.QueueList),
      },
      {
        path: 'mail',
        title: 'Mail',
        loadComponent: () => import('./watch/mail-list').then((m) => m.MailList),
      },
      {
        path: 'card-events',
        title: 'Card events',
        loadComponent: () => import('./watch/card-event-list').then((m) => m.CardEventList),
      },
      {
        path: 'audit',
        title: 'Audit',
        loadComponent: () => import('./watch/audit-list').then((m) => m.AuditList),
      },
      {
        path: '**',
        title: 'No such page',
        loadComponent: () => import('../core/pages/no-such-page').then((m) => m.NoSuchPage),
      },
    ],
  },
];
