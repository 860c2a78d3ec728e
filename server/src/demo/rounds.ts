import { type DateTime } from 'luxon';
import { systemContext } from '../core/context';
import { withTenant, write } from '../core/database/tenancy';
import { planRounds as planDueRounds } from '../features/contracts/plan-rounds';
import { ask } from './ask';
import { type DemoShop } from './set-up';

/** The contracts the shop's clients have agreed on, from the first day on. */
export async function addContracts(shop: DemoShop, first: DateTime): Promise<void> {
  const office = shop.office.at(first.set({ hour: 9 }).toJSDate());
  const minor = 100;
  for (const store of shop.stores) {
    if (!store.plan.contract) continue;
    const everything = store.plan.contract === 'everything';
    await ask(office, 'contracts.create', {
      body: {
        clientId: store.clientId,
        name: `${everything ? 'Full' : 'Labour'} maintenance, ${store.plan.name}`,
        rule: everything ? 'FREQ=MONTHLY;BYDAY=1TU' : 'FREQ=MONTHLY;BYDAY=2WE',
        startsOn: first.toISODate() as string,
        coverage: { labour: true, parts: everything, trip: everything, kinds: [] },
        techMembershipId: shop.techs[0]?.membershipId ?? null,
        stores: [{ storeId: store.id, monthlyFee: (everything ? 420 : 180) * minor }],
      },
    });
  }
  // Rounds are planned from the day a contract was agreed on, which is not today.
  await withTenant(office, () =>
    write('update contracts set created_at = $agreed where shop_id = $shopId', {
      shopId: shop.id,
      agreed: office.now,
    }),
  );
}

/** What the worker's sweep would have planned by this day. */
export async function planRounds(shop: DemoShop, day: DateTime): Promise<void> {
  if (day.weekday !== 1 && day.day !== 1) return;
  await planDueRounds(systemContext(shop.id, day.set({ hour: 5 }).toJSDate()));
}
