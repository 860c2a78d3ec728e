import { record } from '../../core/audit';
import { type Context } from '../../core/context';
import { instantOrNull } from '../../core/database/times';
import { type Bind, row, withTenant, write } from '../../core/database/tenancy';
import { type AnswerOf, type InputOf } from '../../core/http/route';
import { page, searched } from '../../core/lists/keyset';
import { shown } from '../../core/lists/shown';
import { found } from '../../core/problems/problem';
import { orStale } from '../../core/versions';

type ClientPerson = AnswerOf<'clientPeople.end'>;

interface PersonRow extends Omit<ClientPerson, 'since' | 'endedAt'> {
  since: Date;
  endedAt: Date | null;
}

const select = `select m.id, m.name, m.email, m.role, m.client_id as "clientId",
  c.name as "clientName", m.store_id as "storeId", s.name as "storeName",
  m.created_at as since, m.ended_at as "endedAt", m.version
  from memberships m
  join clients c on c.shop_id = m.shop_id and c.id = m.client_id
  left join stores s on s.shop_id = m.shop_id and s.id = m.store_id`;

function present(person: PersonRow): ClientPerson {
  return {
    id: person.id,
    name: person.name,
    email: person.email,
    role: person.role,
    clientId: person.clientId,
    clientName: person.clientName,
    storeId: person.storeId,
    storeName: person.storeName,
    since: person.since.toISOString(),
    endedAt: instantOrNull(person.endedAt),
    version: person.version,
  };
}

export function listClientPeople(
  context: Context,
  query: InputOf<'clientPeople.list'>['query'],
): Promise<AnswerOf<'clientPeople.list'>> {
  return withTenant(context, () => {
    const bind: Bind = { shopId: context.shopId };
    const where = [
      'm.shop_id = $shopId',
      'm.client_id is not null',
      ...shown(query.show, 'm.ended_at'),
      ...searched(query.q, ['m.name', 'm.email'], bind),
    ];
    if (query.clientId) {
      where.push('m.client_id = $clientId');
      bind.clientId = query.clientId;
    }
    if (query.storeId) {
      where.push('m.store_id = $storeId');
      bind.storeId = query.storeId;
    }
    return page<PersonRow, ClientPerson>(
      {
        select,
        from: 'memberships m',
        where,
        bind,
        sort: { column: 'm.name', type: 'text' },
        id: 'm.id',
        limit: query.limit,
        cursor: query.cursor,
      },
      present,
    );
  });
}

export function endClientPerson(
  context: Context,
  membershipId: string,
  version: number,
): Promise<ClientPerson> {
  return withTenant(context, async () => {
    const bind = { shopId: context.shopId, membershipId };
    const read = async () =>
      found(
        await row<PersonRow>(`${select} where m.shop_id = $shopId and m.id = $membershipId`, bind),
      );
    const before = await read();
    if (before.endedAt) return present(before);
    await orStale(
      await write(
        `update memberships set ended_at = $now
         where shop_id = $shopId and id = $membershipId and version = $version returning id`,
        { ...bind, version, now: context.now },
      ),
      read,
    );
    const subject = { kind: 'membership', id: membershipId };
    await record(context, 'client person ended', subject, { role: before.role });
    return present(await read());
  });
}
