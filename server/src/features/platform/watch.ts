import { type Bind, platformRows } from '../../core/database/tenancy';
import { instantOrNull } from '../../core/database/times';
import { type AnswerOf, type InputOf } from '../../core/http/route';
import { platformPage, searched } from '../../core/lists/keyset';

/** How the job queues stand. What is to be done stands in the domain tables; this is who wakes. */
export async function showQueues(): Promise<AnswerOf<'platform.queues'>> {
  const queues = await platformRows<{
    queue: string;
    waiting: number;
    active: number;
    failed: number;
    oldest: Date | null;
  }>(
    `select q.name as queue,
       count(*) filter (where j.state in ('created', 'retry'))::int as waiting,
       count(*) filter (where j.state = 'active')::int as active,
       count(*) filter (where j.state = 'failed' and j.completed_on > now() - interval '1 day')::int
         as failed,
       min(j.start_after) filter (where j.state in ('created', 'retry')) as oldest
     from pgboss.queue q left join pgboss.job j on j.name = q.name
     where q.name not like '\\_\\_pgboss%'
     group by q.name order by q.name`,
  );
  return {
    items: queues.map(({ oldest, ...queue }) => ({
      ...queue,
      oldestWaitingAt: instantOrNull(oldest),
    })),
  };
}

type Audit = AnswerOf<'platform.audit'>['items'][number];
interface AuditRow extends Omit<Audit, 'at'> {
  at: Date;
}

export function listPlatformAudit(
  query: InputOf<'platform.audit'>['query'],
): Promise<AnswerOf<'platform.audit'>> {
  const bind: Bind = {};
  const where = ['true', ...searched(query.q, ['a.what', 'a.by_name'], bind)];
  if (query.shopId) {
    where.push('a.subject_shop_id = $shopId');
    bind.shopId = query.shopId;
  }
  return platformPage<AuditRow, Audit>(
    {
      select: `select a.id, a.at, a.by_name as "byName", a.what, a.subject_shop_id as "shopId",
        (select s.name from shops s where s.id = a.subject_shop_id) as "shopName", a.details
        from platform_audit a`,
      from: 'platform_audit a',
      where,
      bind,
      sort: { column: 'a.at', type: 'timestamptz', descending: true },
      id: 'a.id',
      limit: query.limit,
      cursor: query.cursor,
    },
    ({ id, at, byName, what, shopId, shopName, details }) => ({
      id,
      at: at.toISOString(),
      byName,
      what,
      shopId,
      shopName,
      details,
    }),
  );
}

type CardEvent = AnswerOf<'platform.cardEvents'>['items'][number];
interface CardEventRow {
  id: string;
  type: string;
  account: string | null;
  received_at: Date;
  worked_at: Date | null;
  attempts: number;
  last_error: string | null;
}

/** Kind and fate of events; what they hold is the shops' business and is not shown. */
export function listCardEvents(
  query: InputOf<'platform.cardEvents'>['query'],
): Promise<AnswerOf<'platform.cardEvents'>> {
  const bind: Bind = {};
  const where = ['true', ...searched(query.q, ['e.type', 'e.id'], bind)];
  if (query.state) where.push(`e.worked_at is ${query.state === 'worked' ? 'not ' : ''}null`);
  return platformPage<CardEventRow, CardEvent>(
    {
      select: `select e.id, e.type, e.account, e.received_at, e.worked_at, e.attempts, e.last_error
        from stripe_events e`,
      from: 'stripe_events e',
      where,
      bind,
      sort: { column: 'e.received_at', type: 'timestamptz', descending: true },
      id: 'e.id',
      idType: 'text',
      limit: query.limit,
      cursor: query.cursor,
    },
    (event) => ({
      id: event.id,
      type: event.type,
      account: event.account,
      receivedAt: event.received_at.toISOString(),
      workedAt: instantOrNull(event.worked_at),
      attempts: event.attempts,
      lastError: event.last_error,
    }),
  );
}
