import { type DeliveryState } from '@lib/contracts';
import { record } from '../../core/audit';
import { type Context } from '../../core/context';
import { type Bind, row, withTenant, write } from '../../core/database/tenancy';
import { instantOrNull } from '../../core/database/times';
import { type AnswerOf, type InputOf } from '../../core/http/route';
import { enqueue } from '../../core/jobs/boss';
import { page, searched } from '../../core/lists/keyset';
import { announce } from '../../core/live/live';
import { found, problem } from '../../core/problems/problem';
import { orStale } from '../../core/versions';
import { moveRun } from '../statements/move-run';

type Delivery = AnswerOf<'deliveries.decide'>;

interface DeliveryRow {
  id: string;
  kind: string;
  state: DeliveryState;
  recipient: string;
  recipientName: string;
  subject: string;
  clientId: string | null;
  statementId: string | null;
  attempt: number;
  lastError: string | null;
  nextAttemptAt: Date;
  sentAt: Date | null;
  createdAt: Date;
  version: number;
}

const columns = `d.id, d.kind, d.state, d.recipient, d.recipient_name as "recipientName", d.subject,
  d.client_id as "clientId", d.statement_id as "statementId", d.attempt,
  d.last_error as "lastError", d.next_attempt_at as "nextAttemptAt", d.sent_at as "sentAt",
  d.created_at as "createdAt", d.version`;

function present(delivery: DeliveryRow): Delivery {
  return {
    id: delivery.id,
    kind: delivery.kind,
    state: delivery.state,
    recipient: delivery.recipient,
    recipientName: delivery.recipientName,
    subject: delivery.subject,
    clientId: delivery.clientId,
    statementId: delivery.statementId,
    attempt: delivery.attempt,
    lastError: delivery.lastError,
    nextAttemptAt: delivery.nextAttemptAt.toISOString(),
    sentAt: instantOrNull(delivery.sentAt),
    createdAt: delivery.createdAt.toISOString(),
    version: delivery.version,
  };
}

export function listDeliveries(
  context: Context,
  query: InputOf<'deliveries.list'>['query'],
): Promise<AnswerOf<'deliveries.list'>> {
  return withTenant(context, () => {
    const bind: Bind = { shopId: context.shopId };
    const where = ['d.shop_id = $shopId', ...searched(query.q, ['d.recipient', 'd.subject'], bind)];
    const filter = (value: string | undefined, name: string, condition: string) => {
      if (value === undefined) return;
      bind[name] = value;
      where.push(condition);
    };
    filter(query.state, 'state', 'd.state = $state');
    filter(query.statementId, 'statementId', 'd.statement_id = $statementId');
    filter(query.clientId, 'clientId', 'd.client_id = $clientId');
    filter(
      query.runId,
      'runId',
      `exists (select 1 from statements s
        where s.shop_id = d.shop_id and s.id = d.statement_id and s.run_id = $runId)`,
    );
    return page<DeliveryRow, Delivery>(
      {
        select: `select ${columns} from deliveries d`,
        from: 'deliveries d',
        where,
        bind,
        sort: { column: 'd.created_at', type: 'timestamptz', descending: true },
        id: 'd.id',
        limit: query.limit,
        cursor: query.cursor,
      },
      present,
    );
  });
}

/** A person's word on a mail that went wrong. It is never sent again without one. */
export function decideDelivery(
  context: Context,
  deliveryId: string,
  version: number,
  decision: InputOf<'deliveries.decide'>['body']['decision'],
): Promise<Delivery> {
  return withTenant(context, async () => {
    const bind = { shopId: context.shopId, deliveryId };
    const read = () =>
      row<DeliveryRow & { runId: string | null }>(
        `select ${columns}, s.run_id as "runId" from deliveries d
         left join statements s on s.shop_id = d.shop_id and s.id = d.statement_id
         where d.shop_id = $shopId and d.id = $deliveryId`,
        bind,
      );
    const before = found(await read());
    const allowed = decision === 'arrived' ? ['uncertain'] : ['uncertain', 'failed'];
    if (before.version === version && !allowed.includes(before.state)) {
      throw problem('conflict', 'Only a mail that is uncertain or failed waits for a decision.');
    }
    const arrived = decision === 'arrived';
    const changed = await write<{ id: string }>(
      `update deliveries
       set state = $state, last_error = null,
         sent_at = case when $arrived then now() end, next_attempt_at = now()
       where shop_id = $shopId and id = $deliveryId and version = $version returning id`,
      { ...bind, version, arrived, state: arrived ? 'sent' : 'waiting' },
    );
    await orStale(changed, read);
    await record(context, `mail ${arrived ? 'noted as arrived' : 'sent again'}`, {
      kind: 'delivery',
      id: deliveryId,
    });
    if (!arrived) await enqueue('deliveries-send', { shopId: context.shopId });
    await announce(context, 'delivery', deliveryId);
    if (before.runId) await moveRun(context, before.runId, []);
    return present(found(await read()));
  });
}
