import { type Routes } from '@angular/router';
import { may } from '../core/session/guards';
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
        loadComponent: () => import('./today/today-page').then((m) => m.TodayPage),
      },
      {
        path: 'set-up',
        title: 'Set up the shop',
        canActivate: [may('settings.change')],
        loadComponent: () => import('./set-up/set-up-page').then((m) => m.SetUpPage),
      },
      {
        path: 'clients',
        loadChildren: () => import('./clients/clients.routes').then((m) => m.clientsRoutes),
      },
      {
        path: 'stores',
        loadChildren: () => import('./stores/stores.routes').then((m) => m.storesRoutes),
      },
      {
        path: 'machines',
        loadChildren: () => import('./machines/machines.routes').then((m) => m.machinesRoutes),
      },
      {
        path: 'contacts',
        loadChildren: () => import('./contacts/contacts.routes').then((m) => m.contactsRoutes),
      },
      {
        path: 'imports',
        canActivate: [may('imports.run')],
        loadChildren: () => import('./imports/imports.routes').then((m) => m.importsRoutes),
      },
      {
        path: 'price-book',
        loadChildren: () => import('./price-book/price-book.routes').then((m) => m.priceBookRoutes),
      },
      {
        path: 'parts',
        loadChildren: () => import('./parts/parts.routes').then((m) => m.partsRoutes),
      },
      {
        path: 'crew',
        loadChildren: () => import('./crew/crew.routes').then((m) => m.crewRoutes),
      },
      {
        path: 'settings',
        canActivate: [may('settings.read')],
        loadChildren: () => import('./settings/settings.routes').then((m) => m.settingsRoutes),
      },
      {
        path: '**',
        title: 'No such page',
        loadComponent: () => import('../core/pages/no-such-page').then((m) => m.NoSuchPage),
      },
    ],
  },
];
