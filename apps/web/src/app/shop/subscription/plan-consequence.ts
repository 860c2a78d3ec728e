import { type Plan, type Subscription } from './subscription-api';

type Present = Pick<Subscription, 'state' | 'usage'> & { plan: Pick<Plan, 'monthlyAmount'> };
type Chosen = Pick<Plan, 'name' | 'monthlyAmount' | 'storeLimit' | 'machineLimit' | 'crewLimit'>;

/** What choosing a plan means, in figures; also for what is above its limits already. */
export function planConsequence(
  present: Present,
  plan: Chosen,
  money: (amount: number) => string,
): string {
  const price =
    present.state === 'active'
      ? `${money(plan.monthlyAmount)} a month instead of ${money(present.plan.monthlyAmount)}, ` +
        'from the next bill on. If no card is on record yet, the next page asks for one.'
      : `${money(plan.monthlyAmount)} a month. You give a card on the next page.`;
  const limits = { stores: plan.storeLimit, machines: plan.machineLimit, crew: plan.crewLimit };
  const above = present.usage
    .filter(({ kind, used }) => used > limits[kind])
    .map(({ kind, used }) => `${used} ${kind} where it has room for ${limits[kind]}`);
  if (!above.length) return price;
  return `${price} You have ${above.join(', and ')}: all of it stays, and nothing can be added.`;
}
