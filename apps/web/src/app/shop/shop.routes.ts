import { type Routes } from '@angular/router';
import { ShopFrame } from './shop-frame';

export const shopRoutes: Routes = [
  {
    path: '',
    component: ShopFrame,
    children: [
      { path: '', pathMatch: 'full', redirectTo: 'today' },
      {
        path: 'today',
        title: 'Today',
        loadComponent: () => import('./shop-landing').then((m) => m.ShopLanding),
      },
      {
        path: '**',
        title: 'No such page',
        loadComponent: () => import('../core/pages/no-such-page').then((m) => m.NoSuchPage),
      },
    ],
  },
];
