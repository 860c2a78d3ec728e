import { callProgress, type CallTimes } from './call-progress';

const call: CallTimes = {
  state: 'open',
  reportedAt: new Date('2031-05-05T08:00:00Z'),
  plannedAt: null,
  closedAt: null,
  visitState: null,
  confirmedAt: null,
  arrivedAt: null,
  visitDay: null,
};
const reached = (times: Partial<CallTimes>) =>
  callProgress({ ...call, ...times })
    .filter((step) => step.at !== null)
    .map((step) => step.step);

describe('how far a call has come', () => {
  it('goes from reported to done', () => {
    expect(reached({})).toEqual(['reported']);
    const planned = { state: 'planned', plannedAt: new Date(), visitDay: '6 May' } as const;
    expect(reached(planned)).toEqual(['reported', 'planned']);
    expect(callProgress({ ...call, ...planned })[1]?.words).toBe('A visit is planned for 6 May');
    const there = { ...planned, confirmedAt: new Date(), arrivedAt: new Date() };
    expect(reached(there)).toEqual(['reported', 'planned', 'confirmed', 'arrived']);
    expect(reached({ ...there, state: 'closed', closedAt: new Date() }).at(-1)).toBe('done');
  });

  it('ends when it is taken back', () => {
    expect(reached({ state: 'withdrawn', closedAt: new Date() })).toEqual([
      'reported',
      'withdrawn',
    ]);
  });
});
