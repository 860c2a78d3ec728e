import { type Routes } from '@angular/router';

export const ticketsRoutes: Routes = [
  {
    path: '',
    title: 'Tickets',
    loadComponent: () => import('./ticket-list').then((m) => m.TicketList),
  },
  {
    path: ':ticketId',
    title: 'Ticket',
    loadComponent: () => import('./ticket-page').then((m) => m.TicketPage),
  },
];
