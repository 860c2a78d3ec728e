import { record } from '../../core/audit';
import { type Context } from '../../core/context';
import { changes } from '../../core/database/changes';
import { row, rows, withTenant, write } from '../../core/database/tenancy';
import { type AnswerOf, type InputOf } from '../../core/http/route';
import { announce } from '../../core/live/live';
import { problem } from '../../core/problems/problem';
import { orStale } from '../../core/versions';
import { countUsage } from '../subscription/plan-limits';
import { addCrewProfile } from './add-crew-profile';
import { crewRoles } from './crew-row';
import { showCrewMember } from './read-crew';

type CrewMember = AnswerOf<'crew.show'>;

/** The version is the membership's, which every change touches, also of the mark or the van. */
export function changeCrewMember(
  context: Context,
  membershipId: string,
  version: number,
  body: InputOf<'crew.change'>['body'],
): Promise<CrewMember> {
  return withTenant(context, async () => {
    const before = await showCrewMember(context, membershipId);
    if (before.endedAt) throw problem('conflict', `${before.name} no longer works here.`);
    const { role, ...profile } = body;
    if (before.role === 'shop_owner' && role && role !== 'shop_owner') {
      await keepAnOwner(context, membershipId);
    }
    await touch(context, membershipId, version, role ?? before.role);
    await addCrewProfile(context, membershipId, before.name);
    const { set, bind } = changes(profile, {
      initials: 'initials',
      van: 'van',
      costPerHour: 'cost_per_hour',
    });
    await write(
      `update crew_profiles set ${set} where shop_id = $shopId and membership_id = $membershipId`,
      { ...bind, shopId: context.shopId, membershipId },
    );
    const subject = { kind: 'membership', id: membershipId };
    await record(context, 'crew member changed', subject, {
      fields: Object.keys(body),
      ...(role ? { role } : {}),
    });
    await announce(context, 'crew', membershipId);
    return showCrewMember(context, membershipId);
  });
}

/** What the person may do ends with their access token, ten minutes from now at the latest. */
export function endCrewMember(
  context: Context,
  membershipId: string,
  version: number,
): Promise<CrewMember> {
  return withTenant(context, async () => {
    const before = await showCrewMember(context, membershipId);
    if (before.endedAt) return before;
    if (before.role === 'shop_owner') await keepAnOwner(context, membershipId);
    await orStale(
      await write(
        `update memberships set ended_at = $now
         where shop_id = $shopId and id = $membershipId and version = $version returning id`,
        { shopId: context.shopId, membershipId, version, now: context.now },
      ),
      () => exists(context, membershipId),
    );
    await countUsage(context);
    const subject = { kind: 'membership', id: membershipId };
    await record(context, 'crew member ended', subject, { role: before.role });
    await announce(context, 'crew', membershipId);
    return showCrewMember(context, membershipId);
  });
}

async function touch(
  context: Context,
  membershipId: string,
  version: number,
  role: CrewMember['role'],
): Promise<void> {
  await orStale(
    await write(
      `update memberships m set role = $role
       where m.shop_id = $shopId and m.id = $membershipId and m.version = $version and ${crewRoles}
       returning m.id`,
      { shopId: context.shopId, membershipId, version, role },
    ),
    () => exists(context, membershipId),
  );
}

function exists(context: Context, membershipId: string): Promise<object | undefined> {
  return row('select 1 from memberships where shop_id = $shopId and id = $membershipId', {
    shopId: context.shopId,
    membershipId,
  });
}

/** A shop without an owner could never be managed again. Two owners who leave at once take turns. */
async function keepAnOwner(context: Context, membershipId: string): Promise<void> {
  const owners = await rows<{ id: string }>(
    `select id from memberships
     where shop_id = $shopId and role = 'shop_owner' and ended_at is null order by id for update`,
    { shopId: context.shopId },
  );
  if (owners.some((owner) => owner.id !== membershipId)) return;
  throw problem('conflict', 'A shop has at least one owner: make somebody else an owner first.');
}
