import { type Routes } from '@angular/router';
import { keepsChanges } from '../../core/forms/unsaved-changes';
import { may } from '../../core/session/guards';

export const crewRoutes: Routes = [
  {
    path: '',
    title: 'Crew',
    loadComponent: () => import('./crew-list').then((m) => m.CrewList),
  },
  {
    path: 'invite',
    title: 'Invite somebody to the crew',
    canActivate: [may('crew.manage')],
    canDeactivate: [keepsChanges],
    loadComponent: () => import('./crew-invite').then((m) => m.CrewInvite),
  },
  {
    path: ':membershipId',
    title: 'One of the crew',
    canActivate: [may('crew.manage')],
    canDeactivate: [keepsChanges],
    loadComponent: () => import('./crew-member').then((m) => m.CrewMemberPage),
  },
];
