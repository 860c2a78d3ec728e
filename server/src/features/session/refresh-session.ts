import { tokenHash } from '../../core/auth/mailed-token';
import { type PublicContext } from '../../core/context';
import { platformRow, platformRows, withPlatform } from '../../core/database/tenancy';
import { endSession } from './end-session';
import { idleDays, nextRefreshToken } from './start-session';

interface Chain {
  id: string;
  ended_at: Date | null;
  expires_at: Date;
}

export type Refreshed =
  | { sessionId: string; refreshToken: string }
  /** Another tab refreshed at the same moment: the browser has the new token from that answer. */
  | { sessionId: string; refreshToken: null };

/**
 * Trades a refresh token for the next of its chain. Each is good once; one that comes back was copied
 * by somebody, and nobody can tell which of the two is the thief, so the whole chain ends.
 *
 * Two tabs of one browser may send the same token at once. That is told from a copy by time: the
 * second request had arrived here before the first one's answer was made, so its sender cannot have
 * had the new token. It gets an access token and no link of the chain.
 *
 * An answer that got lost on the way leaves the browser with the used token. When it asks again with
 * the key it made for the first try (`Idempotency-Key`, which a copied cookie does not bring along),
 * it is believed, and gets another link.
 */
export function refreshSession(
  context: PublicContext,
  token: string,
  key: string | undefined,
): Promise<Refreshed | undefined> {
  const askedWith = key ? tokenHash(key) : null;
  return withPlatform(async () => {
    const hash = tokenHash(token);
    // The chain's row is the lock: two requests with tokens of one chain take turns.
    const chain = await platformRow<Chain>(
      `select s.id, s.ended_at, s.expires_at from sessions s
       where s.id = (select session_id from refresh_tokens where token_hash = $hash) for update`,
      { hash },
    );
    if (!chain || chain.ended_at || chain.expires_at <= context.now) return undefined;
    const link = await platformRow<{ used_at: Date | null; asked_with: string | null }>(
      'select used_at, asked_with from refresh_tokens where token_hash = $hash',
      { hash },
    );
    if (!link) return undefined;
    if (link.used_at) {
      const asksAgain = askedWith !== null && askedWith === link.asked_with;
      if (asksAgain) {
        return { sessionId: chain.id, refreshToken: await nextRefreshToken(chain.id) };
      }
      if (context.now < link.used_at) return { sessionId: chain.id, refreshToken: null };
      await endSession(chain.id, 'a refresh token was used twice');
      return undefined;
    }
    const now = new Date();
    await platformRows(
      `update refresh_tokens set used_at = $now, asked_with = $askedWith where token_hash = $hash`,
      { hash, now, askedWith },
    );
    await platformRows(
      `update sessions set last_used_at = $now,
         expires_at = $now::timestamptz + make_interval(days => $idleDays)
       where id = $id`,
      { id: chain.id, now, idleDays },
    );
    return { sessionId: chain.id, refreshToken: await nextRefreshToken(chain.id) };
  });
}
