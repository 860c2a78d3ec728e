import { type Bearer } from '@lib/contracts/web';
import { otherOutcomes } from '@lib/domain/warranty/outcomes';
import { nextToDecide, progressWords, type RulingGroup, rulingGroups } from './ruling-groups';
import { type RulingJob, type RulingLine } from './rulings-api';

function line(
  lineKey: string,
  list: number,
  cost: number,
  proposed: Bearer,
  reasons: [code: string, words: string, decides: boolean][],
  rest: Partial<RulingLine> = {},
): RulingLine {
  return {
    lineKey,
    list,
    cost,
    bearer: proposed,
    waiting: true,
    decision: null,
    outcomes: otherOutcomes({ list, cost }),
    proposed: {
      bearer: proposed,
      needsConfirmation: rest.waiting ?? true,
      reasons: reasons.map(([code, words, decides]) => ({ code, words, decides })),
    },
    ...rest,
  } as RulingLine;
}

const mistake: [string, string, boolean] = ['marked_own_mistake', 'Imre marked it.', true];
const follows: [string, string, boolean] = ['trip_follows_job', 'The trip goes along.', false];
const wear: [string, string, boolean] = ['nothing_applies', 'The store bears it.', true];

const lock = {
  jobId: 'lock',
  lines: [
    line('lock:labour', 9_000, 4_100, 'shop', [mistake]),
    line('lock:part', 6_100, 4_210, 'shop', [mistake]),
    line('lock:trip', 2_000, 500, 'shop', [mistake, follows]),
    line('lock:fee', 300, 0, 'store', [wear], { waiting: false }),
  ],
} as RulingJob;
const valve = {
  jobId: 'valve',
  lines: [line('valve:labour', 5_000, 2_000, 'store', [wear], { waiting: false })],
} as RulingJob;

describe('rulings put together for a decision', () => {
  const groups = rulingGroups([lock, valve]);
  const [first] = groups as [RulingGroup, ...RulingGroup[]];

  it('joins the lines of a job that rest on the same reason, and no others', () => {
    expect(groups.map(({ key }) => key)).toEqual([
      'lock:labour lock:part lock:trip',
      'lock:fee',
      'valve:labour',
    ]);
  });

  it('joins them whatever the rule says of labour, parts and trip in particular', () => {
    const covers = (what: string): [string, string, boolean][] => [
      ['contract_covers', `The contract covers ${what}.`, true],
    ];
    const lines = [
      line('a', 100, 40, 'contract', covers('labour')),
      line('b', 200, 90, 'contract', covers('parts'), { waiting: false }),
    ];
    const [group, ...others] = rulingGroups([{ ...lock, lines }]);
    expect(others).toEqual([]);
    expect(group?.reasons.map(({ words }) => words)).toEqual([
      'The contract covers labour.',
      'The contract covers parts.',
    ]);
    expect(group?.waiting).toBe(true);
  });

  it('numbers each reason once, in the order it was weighed', () => {
    expect(first.reasons.map(({ words }) => words)).toEqual([
      'Imre marked it.',
      'The trip goes along.',
    ]);
  });

  it('adds the figures of every bearer up, the proposed one first', () => {
    expect(first.outcomes[0]).toEqual({ bearer: 'shop', charged: 0, ourCost: 8_810, claimed: 0 });
    const of = (bearer: Bearer) => first.outcomes.find((outcome) => outcome.bearer === bearer);
    expect(of('store')).toEqual({ bearer: 'store', charged: 17_100, ourCost: 0, claimed: 0 });
    expect(of('goodwill')).toMatchObject({ charged: 0, ourCost: 8_810 });
    expect(of('supplier')).toMatchObject({ charged: 0, ourCost: 0, claimed: 8_810 });
    expect(first.list).toBe(17_100);
  });

  it('leads to what waits, and tells how far the owner is', () => {
    expect(nextToDecide(groups)).toBe(first);
    expect(progressWords(groups, first)).toBe('1 of 1 to decide');
    expect(progressWords(groups, groups[2] as RulingGroup)).toBe('');
  });

  it('shows a decision that holds, and that its lines differ', () => {
    const decision = { step: 'overruled', bearer: 'goodwill', why: 'An old client' };
    const decided = { bearer: 'goodwill', waiting: false, decision } as Partial<RulingLine>;
    const one = rulingGroups([
      { ...lock, lines: [line('a', 100, 40, 'shop', [mistake], decided)] },
    ])[0];
    expect(one).toMatchObject({ bearer: 'goodwill', waiting: false, asks: true, decision });
    const mixed = rulingGroups([
      {
        ...lock,
        lines: [
          line('a', 100, 40, 'shop', [mistake], decided),
          line('b', 100, 40, 'shop', [mistake]),
        ],
      },
    ])[0];
    expect(mixed).toMatchObject({ bearer: null, waiting: true, asks: true });
  });
});
