import { type Context } from '../../core/context';
import { type Bind, withTenant } from '../../core/database/tenancy';
import { type AnswerOf, type InputOf } from '../../core/http/route';
import { page, searched } from '../../core/lists/keyset';

type Item = AnswerOf<'audit.list'>['items'][number];

interface AuditRow extends Omit<Item, 'at'> {
  at: Date;
}

export function listAudit(
  context: Context,
  query: InputOf<'audit.list'>['query'],
): Promise<AnswerOf<'audit.list'>> {
  return withTenant(context, () => {
    const bind: Bind = { shopId: context.shopId };
    return page<AuditRow, Item>(
      {
        select: `select a.id, a.at, a.by_name as "byName", a.what, a.subject_kind as "subjectKind",
          a.subject_id as "subjectId", a.details from audit a`,
        from: 'audit a',
        where: ['a.shop_id = $shopId', ...searched(query.q, ['a.what', 'a.by_name'], bind)],
        bind,
        sort: { column: 'a.at', type: 'timestamptz', descending: true },
        id: 'a.id',
        limit: query.limit,
        cursor: query.cursor,
      },
      ({ id, at, byName, what, subjectKind, subjectId, details }) => ({
        id,
        at: at.toISOString(),
        byName,
        what,
        subjectKind,
        subjectId,
        details,
      }),
    );
  });
}
