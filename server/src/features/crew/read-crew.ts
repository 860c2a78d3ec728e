import { type Context } from '../../core/context';
import { type Bind, row, withTenant } from '../../core/database/tenancy';
import { type AnswerOf, type InputOf } from '../../core/http/route';
import { page, searched } from '../../core/lists/keyset';
import { shown } from '../../core/lists/shown';
import { found } from '../../core/problems/problem';
import { crewColumns, crewFrom, crewRoles, type CrewRow, presentCrewMember } from './crew-row';

export function listCrew(
  context: Context,
  query: InputOf<'crew.list'>['query'],
): Promise<AnswerOf<'crew.list'>> {
  return withTenant(context, () => {
    const bind: Bind = { shopId: context.shopId };
    const where = ['m.shop_id = $shopId', crewRoles, ...shown(query.show, 'm.ended_at')];
    if (query.role) {
      where.push('m.role = $role');
      bind.role = query.role;
    }
    where.push(...searched(query.q, ['m.name', 'm.email'], bind));
    return page<CrewRow, AnswerOf<'crew.show'>>(
      {
        select: `select ${crewColumns} from ${crewFrom}`,
        from: 'memberships m',
        where,
        bind,
        sort: { column: 'm.name', type: 'text' },
        id: 'm.id',
        limit: query.limit,
        cursor: query.cursor,
      },
      (member) => presentCrewMember(context, member),
    );
  });
}

export function showCrewMember(
  context: Context,
  membershipId: string,
): Promise<AnswerOf<'crew.show'>> {
  return withTenant(context, async () => {
    const member = await row<CrewRow>(
      `select ${crewColumns} from ${crewFrom}
       where m.shop_id = $shopId and m.id = $membershipId and ${crewRoles}`,
      { shopId: context.shopId, membershipId },
    );
    return presentCrewMember(context, found(member));
  });
}
