import { type Routes } from '@angular/router';

export const contactsRoutes: Routes = [
  {
    path: '',
    title: 'Contacts',
    loadComponent: () => import('./contact-list').then((m) => m.ContactList),
  },
];
