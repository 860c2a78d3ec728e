import { standingOf, type StoredRuling } from './decisions';
import { type RuledLine } from './ruled-line';

const line: RuledLine = {
  lineKey: 'job:1:labour',
  jobId: '1',
  kind: 'labour',
  description: 'Labour on A-01',
  unit: 'minute',
  quantityMilli: 30_000,
  unitPrice: 120_00,
  discount: 0,
  list: 60_00,
  cost: 18_00,
  reasons: [],
  proposal: { bearer: 'shop', reasons: [], needsConfirmation: true },
  basis: 'now',
};

function stored(changes: Partial<StoredRuling>): StoredRuling {
  return {
    lineKey: line.lineKey,
    jobId: '1',
    step: 'proposed',
    bearer: 'shop',
    reasons: [],
    needsConfirmation: true,
    basis: 'now',
    why: '',
    byName: null,
    at: new Date(),
    ...changes,
  };
}

const free: RuledLine = {
  ...line,
  proposal: { bearer: 'store', reasons: [], needsConfirmation: false },
};

describe('how a line stands', () => {
  it('waits for the owner where the rules say so, and else is in force at once', () => {
    expect(standingOf(line, undefined)).toMatchObject({ waiting: true, decision: null });
    expect(standingOf(free, undefined)).toMatchObject({ waiting: false, bearer: 'store' });
    expect(standingOf(line, stored({}))).toMatchObject({ waiting: true, bearer: 'shop' });
  });

  it('follows the owner while the proposal rests on the same', () => {
    const overruled = stored({ step: 'overruled', bearer: 'goodwill' });
    expect(standingOf(line, overruled)).toMatchObject({
      bearer: 'goodwill',
      waiting: false,
      decision: { step: 'overruled' },
    });
  });

  it('asks again once the work was changed after a decision, even where no rule would ask', () => {
    const overtaken = stored({ step: 'overruled', bearer: 'goodwill', basis: 'before' });
    const standing = standingOf(free, overtaken);
    expect(standing).toMatchObject({ bearer: 'store', waiting: true, decision: null });
    expect(standing.proposed.reasons.map((reason) => reason.words)).toEqual([
      'The work was changed after it was overruled that goodwill bears it: look again.',
    ]);
  });

  it('lets a changed proposal pass that nobody had decided on', () => {
    expect(standingOf(free, stored({ basis: 'before' }))).toMatchObject({ waiting: false });
  });
});
