import { v7 as uuid } from 'uuid';
import { record } from '../../core/audit';
import { tokenHash } from '../../core/auth/mailed-token';
import { type Context, type PublicContext } from '../../core/context';
import {
  platformRow,
  platformRows,
  withPlatform,
  withTenant,
  write,
} from '../../core/database/tenancy';
import { found } from '../../core/problems/problem';
import { createFirstEdition } from '../prices/create-first-edition';
import { addCrewProfile } from '../crew/add-crew-profile';
import { countUsage } from '../subscription/plan-limits';

interface SignUp {
  id: string;
  email: string;
  name: string;
  password_hash: string;
  shop_name: string;
  zone: string;
  currency: string;
  locale: string;
  opened_shop_id: string | null;
}

/**
 * Opens the shop a mailed link was sent for, with everything a shop needs on its first day. Following
 * the link again, or after a failure half-way, ends in the same one shop.
 */
export async function openShop(context: PublicContext, token: string): Promise<void> {
  const owner = await withPlatform(async () => {
    const signUp = found(
      await platformRow<SignUp>(
        `select id, email, name, password_hash, shop_name, zone, currency, locale, opened_shop_id
         from sign_ups where token_hash = $hash and expires_at > $now for update`,
        { hash: tokenHash(token), now: context.now },
      ),
    );
    return signUp.opened_shop_id ? ownerOf(signUp.opened_shop_id) : addShop(context, signUp);
  });
  await furnishShop({
    requestId: context.requestId,
    now: context.now,
    ...owner,
    role: 'shop_owner',
    clientId: null,
    storeId: null,
  });
}

type Owner = Pick<Context, 'shopId' | 'userId' | 'membershipId' | 'name'>;

async function ownerOf(shopId: string): Promise<Owner> {
  return found(
    await platformRow<Owner>(
      `select shop_id as "shopId", user_id as "userId", id as "membershipId", name
       from memberships where shop_id = $shopId and role = 'shop_owner' order by created_at limit 1`,
      { shopId },
    ),
  );
}

/** What the platform keeps of a shop: itself, its subscription, its owner. */
async function addShop(context: PublicContext, signUp: SignUp): Promise<Owner> {
  const person = await addPerson(signUp);
  const plan = found(await trialPlan());
  const shopId = uuid();
  const membershipId = uuid();
  const shop = { shopId, now: context.now };
  await platformRows(
    `insert into shops (id, name, zone, currency, locale)
     values ($shopId, $name, $zone, $currency, $locale)`,
    {
      shopId,
      name: signUp.shop_name,
      zone: signUp.zone,
      currency: signUp.currency,
      locale: signUp.locale,
    },
  );
  await platformRows(
    `insert into subscriptions (shop_id, id, plan_id, state, state_since, trial_ends_at)
     values ($shopId, $id, $planId, 'trialing', $now,
       $now::timestamptz + make_interval(days => $trialDays))`,
    { ...shop, id: uuid(), planId: plan.id, trialDays: plan.trial_days },
  );
  await platformRows(
    `insert into subscription_events (shop_id, id, at, event, to_state, note, by_user_id)
     values ($shopId, $id, $now, 'signed_up', 'trialing', $note, $userId)`,
    { ...shop, id: uuid(), note: `Trial of ${plan.name}`, userId: person.id },
  );
  await platformRows(
    `insert into memberships (shop_id, id, user_id, role, name, email)
     values ($shopId, $membershipId, $userId, 'shop_owner', $name, $email)`,
    { shopId, membershipId, userId: person.id, name: person.name, email: signUp.email },
  );
  await platformRows(
    'update sign_ups set confirmed_at = $now, opened_shop_id = $shopId where id = $id',
    { ...shop, id: signUp.id },
  );
  return { shopId, userId: person.id, membershipId, name: person.name };
}

/**
 * A person who is known keeps name and password, also when they have none yet: the link shows the
 * address is theirs, not that it was they who typed the password.
 */
async function addPerson(signUp: SignUp): Promise<{ id: string; name: string }> {
  const [added] = await platformRows<{ id: string; name: string }>(
    `insert into users (id, email, name, password_hash, email_verified_at)
     values ($id, $email, $name, $passwordHash, now())
     on conflict (email) do update set
       email_verified_at = coalesce(users.email_verified_at, excluded.email_verified_at)
     returning id, name`,
    {
      id: uuid(),
      email: signUp.email,
      name: signUp.name,
      passwordHash: signUp.password_hash,
    },
  );
  return found(added);
}

/** The roomiest plan on offer: a trial shows everything, and an import of a whole shop fits. */
function trialPlan(): Promise<{ id: string; name: string; trial_days: number } | undefined> {
  return platformRow(
    `select id, name, trial_days from plans where offered
     order by machine_limit desc, store_limit desc, id limit 1`,
  );
}

/** What is the shop's own business, written as the shop. */
function furnishShop(context: Context): Promise<void> {
  return withTenant(context, async () => {
    const [settings] = await write<{ id: string }>(
      `insert into shop_settings (shop_id, id) values ($shopId, $id)
       on conflict (shop_id) do nothing returning id`,
      { shopId: context.shopId, id: uuid() },
    );
    if (!settings) return;
    await createFirstEdition(context);
    await addCrewProfile(context, context.membershipId as string, context.name);
    await countUsage(context);
    await record(context, 'shop opened', { kind: 'shop', id: context.shopId });
  });
}
