import { tokenHash } from '../../core/auth/mailed-token';
import { platformRows } from '../../core/database/tenancy';

/** Ends one device's chain; its refresh tokens are worth nothing from now on. */
export async function endSession(sessionId: string, because: string): Promise<void> {
  await platformRows(
    `update sessions set ended_at = now(), ended_because = $because
     where id = $sessionId and ended_at is null`,
    { sessionId, because },
  );
}

/** Ends the chain a browser's refresh token belongs to. */
export async function endSessionOf(refreshToken: string): Promise<void> {
  await platformRows(
    `update sessions set ended_at = now(), ended_because = 'signed out'
     where id = (select session_id from refresh_tokens where token_hash = $hash)
       and ended_at is null`,
    { hash: tokenHash(refreshToken) },
  );
}

/** Ends one of a person's own sessions; another's is as absent as one that never was. */
export async function endOwnSession(userId: string, sessionId: string): Promise<boolean> {
  const ended = await platformRows(
    `update sessions set ended_at = coalesce(ended_at, now()),
       ended_because = coalesce(ended_because, 'signed out from another device')
     where id = $sessionId and user_id = $userId returning id`,
    { userId, sessionId },
  );
  return ended.length > 0;
}

/** Ends every session of a person, but the one they are on when it is named. */
export async function endSessionsOf(
  userId: string,
  because: string,
  except: string | null = null,
): Promise<void> {
  await platformRows(
    `update sessions set ended_at = now(), ended_because = $because
     where user_id = $userId and ended_at is null and id is distinct from $except::uuid`,
    { userId, because, except },
  );
}

/** For the sweep: chains that ended or ran out a good while ago, with their tokens. */
export async function forgetOldSessions(): Promise<void> {
  await platformRows(
    `delete from sessions where id in (
       select id from sessions
       where coalesce(ended_at, expires_at) < now() - interval '30 days' limit 5000)`,
  );
  // A chain in daily use grows by a link every ten minutes; used ones matter while a copy might.
  await platformRows(`delete from refresh_tokens where used_at < now() - interval '60 days'`);
}
