import { randomBytes } from 'node:crypto';
import { v7 as uuid } from 'uuid';
import { tokenHash } from '../../core/auth/mailed-token';
import { type PublicContext } from '../../core/context';
import { platformRow, platformRows, withPlatform } from '../../core/database/tenancy';

/** A device that is not used for so long has to sign in again. */
export const idleDays = 30;

/** What a device works as: a membership of a shop, or neither in the platform area. */
export interface WorksAs {
  shopId: string | null;
  membershipId: string | null;
}

/** Begins a device's chain of refresh tokens. Without `as` it goes on as the person last did. */
export function startSession(
  context: PublicContext,
  userId: string,
  as?: WorksAs,
): Promise<{ sessionId: string; refreshToken: string }> {
  return withPlatform(async () => {
    const last = as ?? (await lastWorkedAs(userId));
    const sessionId = uuid();
    await platformRows(
      `insert into sessions
         (id, user_id, shop_id, membership_id, device, started_at, last_used_at, expires_at)
       values ($sessionId, $userId, $shopId, $membershipId, $device, $now, $now,
         $now::timestamptz + make_interval(days => $idleDays))`,
      { sessionId, userId, ...last, device: context.device, now: context.now, idleDays },
    );
    return { sessionId, refreshToken: await nextRefreshToken(sessionId) };
  });
}

/** A fresh link of the chain: 256 random bits, of which only the hash is kept. */
export async function nextRefreshToken(sessionId: string): Promise<string> {
  const token = randomBytes(32).toString('base64url');
  await platformRows(
    'insert into refresh_tokens (token_hash, session_id) values ($hash, $sessionId)',
    { hash: tokenHash(token), sessionId },
  );
  return token;
}

async function lastWorkedAs(userId: string): Promise<WorksAs> {
  const last = await platformRow<WorksAs>(
    `select shop_id as "shopId", membership_id as "membershipId" from sessions
     where user_id = $userId order by last_used_at desc limit 1`,
    { userId },
  );
  return last ?? { shopId: null, membershipId: null };
}
