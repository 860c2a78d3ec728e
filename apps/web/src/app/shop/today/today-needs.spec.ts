import { type TodayFacts } from './today-facts';
import { needsOf } from './today-needs';

const readAs = { locale: 'en-US', currency: 'USD', today: '2031-06-01' };
const list = (value: number, items: unknown[] = []) =>
  ({ items, next: null, count: { value, capped: false } }) as never;

const ids = (facts: Partial<TodayFacts>) =>
  needsOf({ missing: 0, ...facts }, readAs).map(({ id }) => id);

describe('what needs somebody today', () => {
  it('is nothing where nothing waits', () => {
    expect(ids({})).toEqual([]);
    expect(ids({ rulings: list(0), overdue: list(0), failedMails: list(0) })).toEqual([]);
  });

  it('puts what presses before what can wait', () => {
    expect(ids({ rulings: list(2), failedMails: list(1), unticketed: list(3) })).toEqual([
      'mails',
      'rulings',
      'unticketed',
    ]);
  });

  it('offers a month to close with its figures, and stops when a run has begun', () => {
    const close = {
      month: '2031-05',
      mayClose: true,
      run: null,
      totals: { stores: 8, visits: 21, opening: 33250, charged: 287010, closing: 308260 },
      unfinished: { withoutRecipient: { count: 1 } },
    } as never as NonNullable<TodayFacts['close']>;
    const [need] = needsOf({ missing: 0, close }, readAs);
    expect(need?.words).toBe('May 2031 can be closed');
    expect(need?.detail).toBe('8 statements, $3,082.60 in all. 1 store with nobody to mail it to.');
    expect(ids({ close: { ...close, run: { id: 'r', state: 'sending' } } as never })).toEqual([]);
  });

  it('does not ask for the close of a month in which nothing was', () => {
    const totals = { stores: 3, visits: 0, opening: 0, charged: 0, closing: 0 };
    expect(
      ids({ close: { month: '2031-05', mayClose: true, run: null, totals } as never }),
    ).toEqual([]);
  });

  it('says a held close before anything about the next month', () => {
    const runs = list(1, [{ month: '2031-04', state: 'held' }]);
    const [need] = needsOf({ missing: 0, runs }, readAs);
    expect(need).toMatchObject({ id: 'run', words: 'The close of April 2031 is held' });
  });

  it('tells of a plan that is full in the words of the plan', () => {
    const usage = [
      { kind: 'stores', level: 'at', words: '8 of 8 stores in your plan: no more can be added.' },
      { kind: 'crew', level: 'within', words: '' },
    ];
    const subscription = { state: 'active', usage } as never;
    expect(needsOf({ missing: 0, subscription }, readAs)[0]).toMatchObject({
      words: 'The plan is full',
      detail: '8 of 8 stores in your plan: no more can be added.',
      pressing: true,
    });
  });

  it('tells of a trial only when its end is near', () => {
    const trial = (trialEndsAt: string) =>
      ({ state: 'trialing', usage: [], trialEndsAt }) as never as TodayFacts['subscription'];
    expect(ids({ subscription: trial('2031-06-20T00:00:00Z') })).toEqual([]);
    expect(ids({ subscription: trial('2031-06-05T00:00:00Z') })).toEqual(['trial']);
  });

  it('says that a paused shop can write again by choosing a plan', () => {
    const subscription = { state: 'paused', usage: [] } as never;
    expect(needsOf({ missing: 0, subscription }, readAs)[0]).toMatchObject({
      words: 'The shop is paused',
      link: '/shop/subscription',
    });
  });

  it('leads to the one import that waits', () => {
    const imports = list(1, [
      { id: 'i1', state: 'checked', fileName: 'stores.csv', counts: { bad: 3 } },
      { id: 'i2', state: 'applied', fileName: 'old.csv', counts: { bad: 0 } },
    ]);
    expect(needsOf({ missing: 0, imports }, readAs)[0]).toMatchObject({
      detail: 'stores.csv has 3 rows to put right.',
      link: '/shop/imports/i1',
    });
  });
});
