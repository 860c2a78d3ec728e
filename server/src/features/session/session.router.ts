import { handle } from '../../core/http/route';
import { notFound, problem } from '../../core/problems/problem';
import { giveRefreshToken, refreshTokenOf, takeRefreshToken } from './cookies';
import { listDevices } from './devices';
import { endOwnSession, endSessionOf, endSessionsOf } from './end-session';
import { refreshSession } from './refresh-session';
import { sessionAnswer } from './session-answer';
import { signIn } from './sign-in';
import { switchMembership } from './switch-membership';

export const sessionRoutes = [
  handle('session.signIn', (context, { body }, http) => signIn(context, body, http)),

  handle('session.refresh', async (context, _input, { request, response }) => {
    const token = refreshTokenOf(request);
    const key = request.get('idempotency-key')?.slice(0, 100);
    const refreshed = token && (await refreshSession(context, token, key));
    if (!refreshed) {
      takeRefreshToken(response);
      throw problem('not-signed-in');
    }
    if (refreshed.refreshToken) giveRefreshToken(response, refreshed.refreshToken);
    return sessionAnswer(refreshed.sessionId, context.now);
  }),

  handle('session.switch', (context, { body }) => switchMembership(context, body.membershipId)),

  handle('session.signOut', async (_context, _input, { request, response }) => {
    const token = refreshTokenOf(request);
    if (token) await endSessionOf(token);
    takeRefreshToken(response);
  }),

  handle('session.list', (context) => listDevices(context)),

  handle('session.end', async (context, { params }) => {
    if (!(await endOwnSession(context.userId, params.sessionId))) throw notFound();
  }),

  handle('session.signOutEverywhere', async (context, _input, { response }) => {
    await endSessionsOf(context.userId, 'signed out everywhere');
    takeRefreshToken(response);
  }),
];
