import { planConsequence } from './plan-consequence';
import { type Usage } from './subscription-api';

const money = (amount: number) => `$${amount / 100}`;
const usage: Usage[] = [
  { kind: 'stores', used: 18, limit: 80, level: 'within', words: '' },
  { kind: 'machines', used: 180, limit: 4000, level: 'within', words: '' },
  { kind: 'crew', used: 7, limit: 12, level: 'within', words: '' },
];
const workshop = { monthlyAmount: 12_900 };
const bench = {
  name: 'Bench',
  monthlyAmount: 4_900,
  storeLimit: 15,
  machineLimit: 500,
  crewLimit: 3,
};

describe('planConsequence', () => {
  it('compares the price for who pays already, and names what is above a smaller plan', () => {
    const present = { state: 'active', usage, plan: workshop } as const;
    expect(planConsequence(present, bench, money)).toBe(
      '$49 a month instead of $129, from the next bill on. If no card is on record yet, the ' +
        'next page asks for one. You have 18 stores where it has room for 15, and 7 crew where it has room for 3: all of it stays, and nothing can be added.',
    );
  });

  it('says that a card is asked for when nothing is paid yet', () => {
    const present = { state: 'trialing' as const, usage: [], plan: workshop };
    expect(planConsequence(present, bench, money)).toBe(
      '$49 a month. You give a card on the next page.',
    );
  });
});
