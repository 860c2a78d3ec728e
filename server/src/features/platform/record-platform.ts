import { v7 as uuid } from 'uuid';
import { type PlatformContext } from '../../core/context';
import { platformRows } from '../../core/database/tenancy';

/**
 * Writes down who did what in the platform area, or to their own account, which belongs to no shop;
 * in the transaction that does it.
 */
export async function recordPlatform(
  context: Pick<PlatformContext, 'requestId' | 'now' | 'userId' | 'name'>,
  what: string,
  shopId: string | null,
  details: Record<string, unknown> = {},
): Promise<void> {
  await platformRows(
    `insert into platform_audit (id, at, by_user_id, by_name, what, subject_shop_id, details, request_id)
     values ($id, $now, $userId, $name, $what, $shopId, $details, $requestId)`,
    {
      id: uuid(),
      now: context.now,
      userId: context.userId,
      name: context.name,
      what,
      shopId,
      details: JSON.stringify(details),
      requestId: context.requestId,
    },
  );
}
