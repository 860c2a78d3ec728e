import { type Context } from '../../core/context';
import { rows } from '../../core/database/tenancy';

/** As many steps as a superseded number is followed; a longer chain is a mistake. */
const mostSteps = 20;

export interface Successor {
  id: string;
  number: string;
  name: string;
}

/**
 * The part that took the place of each superseded one: the last of its chain. A part that is not
 * superseded is absent. In a tenant transaction.
 */
export async function successorsOf(
  context: Context,
  partIds: readonly string[],
): Promise<Map<string, Successor>> {
  if (!partIds.length) return new Map();
  const found = await rows<Successor & { first_id: string }>(
    `with recursive chain as (
       select id as first_id, superseded_by as next_id, 1 as step from parts
       where shop_id = $shopId and id = any($partIds::uuid[]) and superseded_by is not null
       union all
       select c.first_id, p.superseded_by, c.step + 1 from chain c
       join parts p on p.shop_id = $shopId and p.id = c.next_id
       where p.superseded_by is not null and c.step < ${mostSteps}
     )
     select distinct on (c.first_id) c.first_id, p.id, p.number, p.name
     from chain c join parts p on p.shop_id = $shopId and p.id = c.next_id
     order by c.first_id, c.step desc`,
    { shopId: context.shopId, partIds },
  );
  return new Map(found.map(({ first_id, ...part }) => [first_id, part]));
}

/** Whether following `partId` would lead back to it. */
export async function leadsBack(
  context: Context,
  partId: string,
  supersededBy: string,
): Promise<boolean> {
  const found = await rows(
    `with recursive chain as (
       select $supersededBy::uuid as id, 1 as step
       union all
       select p.superseded_by, c.step + 1 from chain c
       join parts p on p.shop_id = $shopId and p.id = c.id
       where p.superseded_by is not null and c.step <= ${mostSteps}
     )
     select 1 from chain where id = $partId or step > ${mostSteps} limit 1`,
    { shopId: context.shopId, partId, supersededBy },
  );
  return found.length > 0;
}
