import { type HttpEvent, type HttpInterceptorFn, type HttpRequest } from '@angular/common/http';
import { inject } from '@angular/core';
import { catchError, from, type Observable, switchMap, throwError } from 'rxjs';
import { problemFrom } from '../api/problem';
import { Session } from './session';
import { withoutSession } from './without-session';

/** Puts the access token on calls to the API, and when it has run out renews it once and repeats. */
export const sessionInterceptor: HttpInterceptorFn = (
  request,
  next,
): Observable<HttpEvent<unknown>> => {
  if (request.context.get(withoutSession) || !request.url.startsWith('/api/')) return next(request);
  const session = inject(Session);
  const token = session.token();
  return next(withToken(request, token)).pipe(
    catchError((error: unknown) => {
      if (!session.signedIn() || !ranOut(error)) return throwError(() => error);
      return from(session.renew(token)).pipe(
        switchMap((fresh) => (fresh ? next(withToken(request, fresh)) : throwError(() => error))),
      );
    }),
  );
};

function withToken(request: HttpRequest<unknown>, token: string | undefined) {
  return token ? request.clone({ setHeaders: { Authorization: `Bearer ${token}` } }) : request;
}

/** Other refusals with 401 (a wrong password, a missing code) are answers, not an ended session. */
function ranOut(error: unknown): boolean {
  const problem = problemFrom(error);
  return problem.status === 401 && !['sign-in-refused', 'code-required'].includes(problem.kind);
}
