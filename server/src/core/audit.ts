import { v7 as uuid } from 'uuid';
import { type Context } from './context';
import { write } from './database/tenancy';

/** Writes down who did what, in the transaction that does it. No secrets, no amounts of others. */
export async function record(
  context: Context,
  what: string,
  subject: { kind: string; id: string } | null = null,
  details: Record<string, unknown> = {},
): Promise<void> {
  await write(
    `insert into audit (shop_id, id, at, by_user_id, by_name, what, subject_kind, subject_id, details, request_id)
     values ($shopId, $id, $now, $userId, $name, $what, $kind, $subjectId, $details, $requestId)`,
    {
      shopId: context.shopId,
      id: uuid(),
      now: context.now,
      userId: context.userId,
      name: context.name,
      what,
      kind: subject?.kind ?? null,
      subjectId: subject?.id ?? null,
      details: JSON.stringify(details),
      requestId: context.requestId,
    },
  );
}
