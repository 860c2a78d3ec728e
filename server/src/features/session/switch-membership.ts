import { type SignedInContext } from '../../core/context';
import { found, problem } from '../../core/problems/problem';
import { sessionLives } from './devices';
import { membershipsOf } from './memberships-of';
import { personById } from './people';
import { type SessionAnswer, sessionAnswer, workAs } from './session-answer';

/** Goes on as another of the person's own memberships, on this device, without signing in again. */
export async function switchMembership(
  context: SignedInContext,
  membershipId: string,
): Promise<SessionAnswer> {
  // A token outlives its session by some minutes; nothing is switched in a session that ended.
  if (!(await sessionLives(context))) throw problem('not-signed-in');
  const person = found(await personById(context.userId));
  const own = await membershipsOf(person);
  const chosen = found(own.find((membership) => membership.id === membershipId));
  await workAs(context.sessionId, chosen);
  return sessionAnswer(context.sessionId, context.now);
}
