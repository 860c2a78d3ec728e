import { type Request, type Response } from 'express';
import passport from 'passport';
import { Strategy } from 'passport-local';
import { type PublicContext } from '../../core/context';
import { type InputOf } from '../../core/http/route';
import { checkCredentials, refused } from './check-credentials';
import { deviceOf, giveDevice, giveRefreshToken, refreshTokenOf } from './cookies';
import { endSessionOf } from './end-session';
import { type Person } from './people';
import { type SessionAnswer, sessionAnswer } from './session-answer';
import { tryKey } from './sign-in-failures';
import { startSession } from './start-session';

/** Signs a person in by address and password, and by a one-time code when they use them. */
export async function signIn(
  context: PublicContext,
  credentials: InputOf<'session.signIn'>['body'],
  http: { request: Request; response: Response },
): Promise<SessionAnswer> {
  const key = tryKey(credentials.email, context.source, deviceOf(http.request, credentials.email));
  const person = await byPassword(http, () => checkCredentials(context, credentials, key));
  // The browser keeps one chain: whoever was signed in on it before is not any longer.
  const before = refreshTokenOf(http.request);
  if (before) await endSessionOf(before);
  const { sessionId, refreshToken } = await startSession(context, person.id);
  giveRefreshToken(http.response, refreshToken);
  giveDevice(http.response, person.email);
  return sessionAnswer(sessionId, context.now);
}

/** Asks passport for the person; what is checked, and how long that takes, is ours. */
function byPassword(
  { request, response }: { request: Request; response: Response },
  check: () => Promise<Person>,
): Promise<Person> {
  return new Promise((resolve, reject) => {
    const strategy = new Strategy({ usernameField: 'email' }, (_email, _password, done) => {
      check().then((person) => done(null, person), done);
    });
    passport.authenticate(strategy, { session: false }, (error: unknown, person?: Person) => {
      if (error) reject(error as Error);
      else if (person) resolve(person);
      else reject(refused());
    })(request, response, reject);
  });
}
