import { type Routes } from '@angular/router';
import { keepsChanges } from '../../core/forms/unsaved-changes';

export const settingsRoutes: Routes = [
  {
    path: '',
    title: 'Settings',
    canDeactivate: [keepsChanges],
    loadComponent: () => import('./settings-page').then((m) => m.SettingsPage),
  },
];
