import { inject } from '@angular/core';
import { type CanActivateFn, type CanMatchFn, RedirectCommand, Router } from '@angular/router';
import { type Permission } from '@lib/contracts/web';
import { homeOf } from '../navigation/areas';
import { Session } from './session';

/** Lets in who is signed in; others sign in first and come back. */
export const signedIn: CanActivateFn = async (_route, state) => {
  const session = inject(Session);
  const router = inject(Router);
  await session.start();
  if (!session.signedIn()) {
    return router.createUrlTree(['/sign-in'], { queryParams: { next: state.url } });
  }
  return session.membership() ? true : router.createUrlTree(['/memberships']);
};

/** As `signedIn`, but a person without any membership may enter too: to choose one, or to sign out. */
export const knownPerson: CanActivateFn = async (_route, state) => {
  const session = inject(Session);
  const router = inject(Router);
  await session.start();
  return (
    session.signedIn() || router.createUrlTree(['/sign-in'], { queryParams: { next: state.url } })
  );
};

/** Lets in whose role may; say it on routes below `signedIn`. */
export function may(permission: Permission): CanActivateFn {
  return () => {
    const session = inject(Session);
    if (session.may(permission)) return true;
    const router = inject(Router);
    return new RedirectCommand(router.createUrlTree(['/no-entry']), { skipLocationChange: true });
  };
}

/** Leads from the root to where the person works. */
export const toOwnArea: CanActivateFn = async () => {
  const session = inject(Session);
  const router = inject(Router);
  await session.start();
  if (!session.signedIn()) return router.createUrlTree(['/sign-in']);
  const role = session.role();
  return router.createUrlTree([role ? homeOf(role) : '/memberships']);
};

/** For areas: only the roles that work there. */
export function forRoles(...roles: readonly string[]): CanMatchFn {
  return async () => {
    const session = inject(Session);
    await session.start();
    const role = session.role();
    // Who is not signed in goes on to `signedIn`, which remembers where they wanted to go.
    return role === undefined || roles.includes(role);
  };
}
