import { type Routes } from '@angular/router';
import { keepsChanges } from '../core/forms/unsaved-changes';
import { FieldFrame } from './field-frame';

export const fieldRoutes: Routes = [
  {
    path: '',
    component: FieldFrame,
    children: [
      { path: '', pathMatch: 'full', redirectTo: 'day' },
      {
        path: 'day',
        title: 'Day',
        loadComponent: () => import('./day/day-page').then((m) => m.DayPage),
      },
      {
        path: 'outbox',
        title: 'Entries of this device',
        loadComponent: () => import('./outbox/outbox-page').then((m) => m.OutboxPage),
      },
      {
        path: 'visits/:visitId',
        loadComponent: () => import('./visit/visit-frame').then((m) => m.VisitFrame),
        children: [
          {
            path: '',
            title: 'Visit',
            loadComponent: () => import('./visit/visit-page').then((m) => m.VisitPage),
          },
          {
            path: 'jobs/:jobId',
            title: 'Job',
            loadComponent: () => import('./job/job-page').then((m) => m.JobPage),
          },
          {
            path: 'hand-over',
            title: 'Hand over',
            canDeactivate: [keepsChanges],
            loadComponent: () => import('./visit/hand-over-page').then((m) => m.HandOverPage),
          },
          {
            path: 'sign-off',
            title: 'Sign off',
            loadComponent: () => import('./visit/sign-off-page').then((m) => m.SignOffPage),
          },
        ],
      },
      {
        path: '**',
        title: 'No such page',
        loadComponent: () => import('../core/pages/no-such-page').then((m) => m.NoSuchPage),
      },
    ],
  },
];
