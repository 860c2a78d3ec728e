import { floorOf, type StoreFloor } from './floor-of';

type Machine = StoreFloor['banks'][number]['machines'][number];

function machine(facts: Partial<Machine>): Machine {
  return {
    id: 'm1',
    bay: 'A-04',
    bayNumber: 4,
    kind: 'top_loader',
    energy: 'electric',
    make: 'Kestrel',
    model: 'TL-9',
    state: 'up',
    stateSince: '2031-05-06T22:30:00Z',
    conditions: 0,
    openCalls: 0,
    version: 1,
    ...facts,
  };
}

function floor(...machines: Machine[]): StoreFloor {
  return {
    store: { id: 's', number: 'S-001', name: 'Foxglove Lane', client: { id: 'c', name: 'Alder' } },
    banks: [{ id: 'a', letter: 'A', words: 'by the window', version: 1, machines }],
  };
}

const chicago = { locale: 'en-US', zone: 'America/Chicago' };

describe('floorOf', () => {
  it('names bank and bay as people say them', () => {
    const [bank] = floorOf(floor(machine({})), chicago);
    expect(bank?.name).toBe('A, by the window');
    expect(bank?.bays[0]).toMatchObject({ label: 'A-04', note: 'Kestrel TL-9' });
  });

  it('says since which day of the store a machine is not up, and what waits there', () => {
    const down = machine({ state: 'down', conditions: 2, openCalls: 1, make: '', model: '' });
    const [bank] = floorOf(floor(down), { ...chicago, zone: 'Europe/Vienna' });
    expect(bank?.bays[0]?.note).toBe('since Wed, May 7, 2031, 2 conditions, 1 call');
  });
});
