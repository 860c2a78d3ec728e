import { v7 as uuid } from 'uuid';
import { type Context } from '../../core/context';
import { rows, withTenant, write } from '../../core/database/tenancy';
import { initialsFor } from './initials';

/** Gives a person who joined the crew a mark on the day sheet. Who has one keeps it. */
export function addCrewProfile(
  context: Pick<Context, 'shopId' | 'clientId'>,
  membershipId: string,
  name: string,
): Promise<void> {
  return withTenant(context, async () => {
    const shopId = context.shopId;
    const others = await rows<{ initials: string }>(
      `select p.initials from crew_profiles p
       join memberships m on m.shop_id = p.shop_id and m.id = p.membership_id
       where p.shop_id = $shopId and m.ended_at is null`,
      { shopId },
    );
    await write(
      `insert into crew_profiles (shop_id, id, membership_id, initials)
       values ($shopId, $id, $membershipId, $initials)
       on conflict (shop_id, membership_id) do nothing`,
      {
        shopId,
        id: uuid(),
        membershipId,
        initials: initialsFor(
          name,
          others.map((other) => other.initials),
        ),
      },
    );
  });
}
