import { type Plan, type Shop } from '../platform-api';
import { eventWords, planConsequence } from './shop-words';

const plan = (facts: Partial<Plan>): Plan => ({
  id: 'p1',
  code: 'bench',
  name: 'Bench',
  monthlyAmount: 4900,
  currency: 'USD',
  storeLimit: 15,
  machineLimit: 500,
  crewLimit: 3,
  trialDays: 30,
  graceDays: 14,
  offered: true,
  version: 1,
  shops: 0,
  ...facts,
});

const shop = {
  plan: plan({ id: 'p2', name: 'Workshop' }),
  usage: [
    { kind: 'stores', used: 8, limit: 80, level: 'within', words: '' },
    { kind: 'crew', used: 6, limit: 12, level: 'within', words: '' },
  ],
} satisfies Pick<Shop, 'plan' | 'usage'>;

describe('planConsequence', () => {
  it('names what the shop has too much of for the plan, and that it keeps it', () => {
    const words = planConsequence(shop, plan({}));
    expect(words).toContain('6 people of the crew where Bench allows 3');
    expect(words).toContain('keeps all of it');
    expect(words).not.toContain('stores');
  });

  it('says when everything fits, and when nothing changes', () => {
    expect(planConsequence(shop, plan({ crewLimit: 6 }))).toContain('fits into Bench');
    expect(planConsequence(shop, shop.plan)).toContain('already');
  });
});

describe('eventWords', () => {
  const event = { id: 'e', at: '', event: 'payment_failed', note: '' };

  it('tells what happened and what it led to', () => {
    const moved = { ...event, fromState: 'active', toState: 'past_due' } as const;
    expect(eventWords(moved)).toBe('A payment failed: active, then past due.');
  });

  it('tells an event that changed no state, with its note', () => {
    const noted = {
      ...event,
      event: 'plan_changed',
      fromState: null,
      toState: null,
      note: 'Asked.',
    };
    expect(eventWords(noted)).toBe('Put on another plan. Asked.');
  });
});
