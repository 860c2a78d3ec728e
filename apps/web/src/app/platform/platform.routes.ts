import { type Routes } from '@angular/router';
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
        loadComponent: () => import('./platform-landing').then((m) => m.PlatformLanding),
      },
      {
        path: '**',
        title: 'No such page',
        loadComponent: () => import('../core/pages/no-such-page').then((m) => m.NoSuchPage),
      },
    ],
  },
];
