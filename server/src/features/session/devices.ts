import { type SignedInContext } from '../../core/context';
import { platformRow, platformRows } from '../../core/database/tenancy';
import { type AnswerOf } from '../../core/http/route';

/** Where the person is signed in, the newest use first. */
export async function listDevices(context: SignedInContext): Promise<AnswerOf<'session.list'>> {
  const sessions = await platformRows<{
    id: string;
    device: string;
    started_at: Date;
    last_used_at: Date;
  }>(
    `select id, device, started_at, last_used_at from sessions
     where user_id = $userId and ended_at is null and expires_at > $now
     order by last_used_at desc limit 100`,
    { userId: context.userId, now: context.now },
  );
  return {
    items: sessions.map((session) => ({
      id: session.id,
      startedAt: session.started_at.toISOString(),
      lastUsedAt: session.last_used_at.toISOString(),
      device: session.device,
      current: session.id === context.sessionId,
    })),
  };
}

export async function sessionLives(
  context: Pick<SignedInContext, 'userId' | 'sessionId'>,
): Promise<boolean> {
  const session = await platformRow(
    'select 1 from sessions where id = $sessionId and user_id = $userId and ended_at is null',
    { userId: context.userId, sessionId: context.sessionId },
  );
  return session !== undefined;
}
