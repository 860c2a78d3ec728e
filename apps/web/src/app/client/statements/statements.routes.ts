import { type Routes } from '@angular/router';

export const statementsRoutes: Routes = [
  {
    path: '',
    title: 'Statements',
    loadComponent: () => import('./statement-list').then((m) => m.StatementList),
  },
  {
    path: ':statementId',
    title: 'Statement',
    loadComponent: () => import('./statement-page').then((m) => m.StatementPage),
  },
];
