import { type NextFunction, type Request, type Response } from 'express';
import passport from 'passport';
import { problem } from '../problems/problem';
import { type Claims } from './access-token';

/** Reads the access token. The token rides in a header that no other site can set: see decision 0004. */
export function authenticate(request: Request, response: Response, next: NextFunction): void {
  const done = (error: unknown, claims: Claims | false) => {
    if (error) return next(error);
    if (!claims) return next(problem('not-signed-in'));
    request.user = claims;
    next();
  };
  passport.authenticate('jwt', { session: false }, done)(request, response, next);
}
