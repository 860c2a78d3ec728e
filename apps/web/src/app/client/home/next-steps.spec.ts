import { type Call, type MachineSummary, type VisitItem } from './home-api';
import { nextSteps, standingStill } from './next-steps';

const foxglove = { id: 's1', name: 'Foxglove Lane' };

function machine(facts: Partial<MachineSummary>): MachineSummary {
  return {
    id: 'm1',
    store: foxglove,
    bay: 'A-04',
    kind: 'top_loader',
    energy: 'electric',
    make: 'Kestrel',
    model: 'TL-9',
    serial: '',
    state: 'down',
    stateSince: '2031-05-05T12:00:00Z',
    takingsADay: 2400,
    version: 1,
    ...facts,
  };
}

function visit(facts: Partial<VisitItem>): VisitItem {
  return {
    id: 'v1',
    number: 412,
    store: { ...foxglove, address: '' },
    client: { id: 'c1', name: 'Alder' },
    tech: null,
    plannedOn: '2031-05-07',
    window: null,
    state: 'planned',
    reason: '',
    calls: 0,
    bays: [],
    jobs: 0,
    arrivedAt: null,
    leftAt: null,
    ticket: null,
    roundId: null,
    version: 1,
    ...facts,
  };
}

function call(facts: Partial<Call>): Call {
  return {
    id: 'k1',
    number: 9,
    store: foxglove,
    client: { id: 'c1', name: 'Alder' },
    machine: { id: 'm1', bay: 'A-04', kind: 'top_loader', make: '', model: '' },
    symptom: 'wont_drain',
    words: '',
    state: 'open',
    reportedBy: 'Noor',
    reportedVia: 'client',
    reportedAt: '2031-05-05T12:00:00Z',
    closedAt: null,
    visit: null,
    version: 1,
    ...facts,
  };
}

const planned = { id: 'v1', number: 412, state: 'planned', plannedOn: '', window: null } as const;

describe('nextSteps', () => {
  it('tells visits in the order they come, each with the calls it is for', () => {
    const window = (from: string) => ({ from, until: '' });
    const steps = nextSteps({
      notUp: [],
      visits: [
        visit({ id: 'v3', plannedOn: '2031-05-08' }),
        visit({ id: 'v2' }),
        visit({ id: 'v1', window: window('2031-05-07T13:00:00Z') }),
      ],
      calls: [call({ state: 'planned', visit: planned })],
    });
    expect(steps.map((step) => step.kind === 'visit' && step.visit.id)).toEqual(['v1', 'v2', 'v3']);
    expect(steps.map((step) => step.kind === 'visit' && step.calls.length)).toEqual([1, 0, 0]);
  });

  it('tells calls that no visit is planned for, and then faulty machines nobody comes for', () => {
    const degraded = (id: string, bay: string) => machine({ id, bay, state: 'degraded' });
    const steps = nextSteps({
      notUp: [degraded('m1', 'A-04'), degraded('m2', 'B-01'), degraded('m3', 'B-02')],
      visits: [visit({ bays: ['B-01'] })],
      calls: [call({})],
    });
    expect(steps.map(({ kind }) => kind)).toEqual(['visit', 'call', 'machine']);
    expect(steps[2]).toMatchObject({ machine: { id: 'm3' } });
  });
});

describe('standingStill', () => {
  const now = new Date('2031-05-06T12:00:00Z');

  it('names what each machine missed, the dearest first, and nothing for one that still runs', () => {
    const still = standingStill(
      {
        notUp: [
          machine({ id: 'm1', stateSince: '2031-05-06T00:00:00Z' }),
          machine({ id: 'm2', state: 'locked_out' }),
          machine({ id: 'm3', state: 'degraded' }),
        ],
        visits: [],
        calls: [],
      },
      now,
    );
    expect(still.map(({ machine: { id }, missed }) => [id, missed])).toEqual([
      ['m2', 2400],
      ['m1', 1200],
    ]);
  });

  it('finds the visit that comes for a machine, by its call or by its bay', () => {
    const still = standingStill(
      {
        notUp: [
          machine({ id: 'm1' }),
          machine({ id: 'm2', bay: 'B-01' }),
          machine({ id: 'm3', bay: 'B-01', store: { id: 's2', name: 'Quay 9' } }),
        ],
        visits: [visit({ bays: ['B-01'] })],
        calls: [call({ state: 'planned', visit: planned })],
      },
      now,
    );
    expect(still.map(({ visit, called }) => [visit?.id, called])).toEqual([
      ['v1', true],
      ['v1', false],
      [undefined, false],
    ]);
  });

  it('counts no takings where no money is shown', () => {
    const known = { notUp: [machine({ takingsADay: null })], visits: [], calls: [] };
    expect(standingStill(known, now)[0]?.missed).toBe(0);
  });
});
