import { type Routes } from '@angular/router';
import { SignIn } from './public/sign-in/sign-in';
import { forRoles, knownPerson, signedIn, toOwnArea } from './core/session/guards';

const noEntry = () => import('./core/pages/no-entry').then((m) => m.NoEntry);

/** An area is loaded only for the roles that work there; others are told so. */
export const routes: Routes = [
  { path: '', pathMatch: 'full', canActivate: [toOwnArea], children: [] },
  {
    path: 'shop',
    canMatch: [forRoles('shop_owner', 'office')],
    canActivate: [signedIn],
    data: { area: 'Shop' },
    loadChildren: () => import('./shop/shop.routes').then((m) => m.shopRoutes),
  },
  {
    path: 'field',
    canMatch: [forRoles('shop_owner', 'office', 'tech')],
    canActivate: [signedIn],
    data: { area: 'Field' },
    loadChildren: () => import('./field/field.routes').then((m) => m.fieldRoutes),
  },
  {
    path: 'client',
    canMatch: [forRoles('client_owner', 'attendant')],
    canActivate: [signedIn],
    data: { area: 'Client' },
    loadChildren: () => import('./client/client.routes').then((m) => m.clientRoutes),
  },
  {
    path: 'platform',
    canMatch: [forRoles('platform_admin')],
    canActivate: [signedIn],
    data: { area: 'Platform' },
    loadChildren: () => import('./platform/platform.routes').then((m) => m.platformRoutes),
  },
  // Reached when the area above did not match the role.
  { path: 'shop', title: 'Not open to you', children: [{ path: '**', loadComponent: noEntry }] },
  { path: 'field', title: 'Not open to you', children: [{ path: '**', loadComponent: noEntry }] },
  { path: 'client', title: 'Not open to you', children: [{ path: '**', loadComponent: noEntry }] },
  {
    path: 'platform',
    title: 'Not open to you',
    children: [{ path: '**', loadComponent: noEntry }],
  },
  {
    path: 'sign-in',
    title: 'Sign in',
    // What most people see first comes with the first load, not after it in a dozen pieces.
    component: SignIn,
  },
  {
    path: 'sign-up',
    title: 'Open a shop',
    loadComponent: () => import('./public/sign-up/sign-up').then((m) => m.SignUp),
  },
  {
    path: 'verify-email',
    title: 'Confirm your address',
    loadComponent: () => import('./public/verify-email/verify-email').then((m) => m.VerifyEmail),
  },
  {
    path: 'forgot-password',
    title: 'Forgotten password',
    loadComponent: () =>
      import('./public/forgot-password/forgot-password').then((m) => m.ForgotPassword),
  },
  {
    path: 'reset-password',
    title: 'Choose a new password',
    loadComponent: () =>
      import('./public/reset-password/reset-password').then((m) => m.ResetPassword),
  },
  {
    path: 'invitations/:token',
    title: 'Invitation',
    loadComponent: () => import('./public/invitation/invitation').then((m) => m.Invitation),
  },
  {
    path: 'memberships',
    title: 'Go on as',
    canActivate: [knownPerson],
    loadComponent: () => import('./public/memberships/memberships').then((m) => m.Memberships),
  },
  {
    path: 'account',
    canActivate: [knownPerson],
    loadChildren: () => import('./public/account/account.routes').then((m) => m.accountRoutes),
  },
  { path: 'no-entry', title: 'Not open to you', loadComponent: noEntry },
  {
    path: 'went-wrong',
    title: 'Could not be opened',
    loadComponent: () => import('./core/pages/went-wrong').then((m) => m.WentWrong),
  },
  {
    path: '**',
    title: 'No such page',
    loadComponent: () => import('./core/pages/not-found').then((m) => m.NotFound),
  },
];
