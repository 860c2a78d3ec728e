import { type Routes } from '@angular/router';
import { keepsChanges } from '../../core/forms/unsaved-changes';
import { may } from '../../core/session/guards';

export const machinesRoutes: Routes = [
  {
    path: '',
    title: 'Machines',
    loadComponent: () => import('./machine-list').then((m) => m.MachineList),
  },
  {
    path: ':machineId',
    title: 'Machine',
    canDeactivate: [keepsChanges],
    loadComponent: () => import('./machine-page').then((m) => m.MachinePage),
  },
  {
    path: ':machineId/change',
    title: 'Change a machine',
    canActivate: [may('machines.change')],
    canDeactivate: [keepsChanges],
    loadComponent: () => import('./machine-form').then((m) => m.MachineForm),
  },
];
