import { checkStatement, printedRfReference, tradeDayOf } from '@lib/domain';
import { type DeliveryState } from '@lib/contracts';
import { type Context } from '../../core/context';
import { type Bind, row, rows, withTenant } from '../../core/database/tenancy';
import { instantOrNull } from '../../core/database/times';
import { files } from '../../core/files/file-store';
import { type AnswerOf, type InputOf, RawReply } from '../../core/http/route';
import { page, searched, type SortKey } from '../../core/lists/keyset';
import { found, problem } from '../../core/problems/problem';
import { shopFacts } from '../../core/shop-facts';
import { toPayUpTo } from '../receivables/to-pay';
import { ownClient } from '../stores/own-store';
import {
  openOfStatement,
  presentStatement,
  statementColumns,
  statementFrom,
  type StatementItem,
  type StatementRow,
} from './statement-rows';
import { type StoredSnapshot } from './stored-snapshot';

const sorts: Record<InputOf<'statements.list'>['query']['sort'], SortKey> = {
  '-month': { column: 's.month', type: 'text', descending: true },
  month: { column: 's.month', type: 'text' },
  dueOn: { column: 's.due_on', type: 'date' },
  '-number': { column: 's.number', type: 'bigint', descending: true },
};

const stateConditions: Record<StatementItem['state'], string> = {
  paid: `${openOfStatement} <= 0`,
  open: `${openOfStatement} > 0 and s.due_on >= $today`,
  overdue: `${openOfStatement} > 0 and s.due_on < $today`,
};

export function listStatements(
  context: Context,
  query: InputOf<'statements.list'>['query'],
): Promise<AnswerOf<'statements.list'>> {
  return withTenant(context, async () => {
    const today = tradeDayOf(context.now, (await shopFacts(context)).zone);
    const bind: Bind = { shopId: context.shopId };
    const where = [
      's.shop_id = $shopId',
      ...ownClient(context, 's.client_id', bind),
      ...searched(query.q, ['t.name', 'c.name'], bind),
    ];
    const filter = (value: string | undefined, name: string, condition: string) => {
      if (value === undefined) return;
      bind[name] = value;
      where.push(condition);
    };
    filter(query.clientId, 'clientId', 's.client_id = $clientId');
    filter(query.storeId, 'storeId', 's.store_id = $storeId');
    filter(query.month, 'month', 's.month = $month');
    filter(query.runId, 'runId', 's.run_id = $runId');
    if (query.state) {
      where.push(stateConditions[query.state]);
      if (query.state !== 'paid') bind.today = today;
    }
    return page<StatementRow, StatementItem>(
      {
        select: `select ${statementColumns} from ${statementFrom}`,
        from: statementFrom,
        where,
        bind,
        sort: sorts[query.sort],
        id: 's.id',
        limit: query.limit,
        cursor: query.cursor,
      },
      (statement) => presentStatement(statement, today),
    );
  });
}

type ShownRow = StatementRow & { snapshot: StoredSnapshot };

export function showStatement(
  context: Context,
  statementId: string,
): Promise<AnswerOf<'statements.show'>> {
  return withTenant(context, async () => {
    const statement = found(
      await row<ShownRow>(
        `select ${statementColumns}, s.snapshot from ${statementFrom}
         where s.shop_id = $shopId and s.id = $statementId`,
        { shopId: context.shopId, statementId },
      ),
    );
    const shop = await shopFacts(context);
    const { snapshot } = statement;
    return {
      ...presentStatement(statement, tradeDayOf(context.now, shop.zone)),
      reference: printedRfReference(snapshot.reference),
      shopName: shop.name,
      lines: snapshot.lines,
      visits: snapshot.visits,
      sums: snapshot.sums,
      checks: checkStatement(snapshot).map(({ words, holds }) => ({ words, holds })),
      toPay: await toPayUpTo(context, statement.storeId, statement.dueOn, statement.id),
      cardPossible: shop.cardAccount !== null,
      deliveries: await deliveriesOf(context, statementId),
    };
  });
}

/** Row security shows a client's people none. */
async function deliveriesOf(context: Context, statementId: string) {
  const found = await rows<{
    id: string;
    recipient: string;
    state: DeliveryState;
    sentAt: Date | null;
    error: string | null;
  }>(
    `select id, recipient, state, sent_at as "sentAt", last_error as error from deliveries
     where shop_id = $shopId and statement_id = $statementId order by recipient, id`,
    { shopId: context.shopId, statementId },
  );
  return found.map((delivery) => ({ ...delivery, sentAt: instantOrNull(delivery.sentAt) }));
}

export async function statementFile(context: Context, statementId: string): Promise<RawReply> {
  const file = await withTenant(context, async () => {
    const bind = { shopId: context.shopId, statementId };
    found(
      await row('select 1 from statements where shop_id = $shopId and id = $statementId', bind),
    );
    return row<{ name: string; sha256: string }>(
      `select name, sha256 from attachments
       where shop_id = $shopId and owner_kind = 'statement' and owner_id = $statementId
       order by created_at limit 1`,
      bind,
    );
  });
  if (!file) throw problem('conflict', 'The PDF is being made: try again in a minute.');
  const content = await files().get(context.shopId, file.sha256);
  return new RawReply((response) => {
    response.status(200).set({
      'Content-Type': 'application/pdf',
      'Content-Disposition': `inline; filename="${file.name}"`,
      'Content-Length': String(content.length),
    });
    response.end(content);
  });
}
