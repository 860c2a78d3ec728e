import { type Context } from '../../core/context';
import { type Bind, withTenant } from '../../core/database/tenancy';
import { type AnswerOf, type InputOf } from '../../core/http/route';
import { page, searched } from '../../core/lists/keyset';
import {
  invitationColumns,
  type InvitationRow,
  presentInvitation,
  stateConditions,
} from './invitation-row';

export function listInvitations(
  context: Context,
  query: InputOf<'invitations.list'>['query'],
): Promise<AnswerOf<'invitations.list'>> {
  return withTenant(context, () => {
    const bind: Bind = { shopId: context.shopId };
    const where = [
      'i.shop_id = $shopId',
      ...searched(query.q, ['i.name', 'i.email', 'i.client_name'], bind),
    ];
    if (query.state) {
      where.push(stateConditions[query.state]);
      if (stateConditions[query.state].includes('$now')) bind.now = context.now;
    }
    if (query.clientId) {
      where.push('i.client_id = $clientId');
      bind.clientId = query.clientId;
    }
    return page<InvitationRow, AnswerOf<'invitations.send'>>(
      {
        select: `select ${invitationColumns} from invitations i`,
        from: 'invitations i',
        where,
        bind,
        sort: { column: 'i.created_at', type: 'timestamptz', descending: true },
        id: 'i.id',
        limit: query.limit,
        cursor: query.cursor,
      },
      (row) => presentInvitation(row, context.now),
    );
  });
}
