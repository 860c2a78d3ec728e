import { type SetUpFacts } from './set-up-facts';
import { nextStep, setUpSteps } from './set-up-steps';

const fresh: SetUpFacts = {
  finished: false,
  hasAddress: false,
  editions: 1,
  clients: 0,
  stores: 0,
  machines: 0,
  statementContacts: 0,
  crew: 1,
  clientPeople: 0,
  takesCards: false,
  onlyClientId: undefined,
  onlyStoreId: undefined,
};

const next = (facts: Partial<SetUpFacts>) => nextStep(setUpSteps({ ...fresh, ...facts }))?.id;

describe('setting up a shop', () => {
  it('leads from one needed step to the next', () => {
    expect(next({})).toBe('shop');
    expect(next({ hasAddress: true })).toBe('client');
    expect(next({ hasAddress: true, clients: 1 })).toBe('store');
    expect(next({ hasAddress: true, clients: 1, stores: 1 })).toBe('machines');
    expect(next({ hasAddress: true, clients: 1, stores: 1, machines: 9 })).toBe('contacts');
  });

  it('comes to what can be done without only after that', () => {
    const needed = { hasAddress: true, clients: 1, stores: 1, machines: 9, statementContacts: 1 };
    expect(next(needed)).toBe('prices');
    expect(next({ ...needed, editions: 2 })).toBe('crew');
    const all = { ...needed, editions: 2, crew: 3, clientPeople: 1, takesCards: true };
    expect(next(all)).toBeUndefined();
  });

  it('leads right to the only store there is', () => {
    const machines = (facts: Partial<SetUpFacts>) =>
      setUpSteps({ ...fresh, ...facts }).find(({ id }) => id === 'machines')?.link;
    expect(machines({ onlyStoreId: 's1' })).toBe('/shop/stores/s1/machines/several');
    expect(machines({})).toBe('/shop/stores');
  });
});
