import { type Routes } from '@angular/router';

export const machinesRoutes: Routes = [
  {
    path: '',
    title: 'Machines',
    loadComponent: () => import('./machines-page').then((m) => m.MachinesPage),
  },
  {
    path: ':machineId',
    title: 'Machine',
    loadComponent: () => import('./machine-page').then((m) => m.MachinePage),
  },
];
