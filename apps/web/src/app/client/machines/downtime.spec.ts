import { lengthText, outagesOf } from './downtime';
import { type CallItem } from './machines-api';

function call(facts: Partial<CallItem>): CallItem {
  return {
    id: 'k1',
    number: 9,
    store: { id: 's1', name: 'Foxglove Lane' },
    client: { id: 'c1', name: 'Alder' },
    machine: null,
    symptom: 'leaks',
    words: '',
    state: 'closed',
    reportedBy: 'Noor',
    reportedVia: 'client',
    reportedAt: '2031-05-05T12:00:00Z',
    closedAt: '2031-05-06T13:30:00Z',
    visit: null,
    version: 1,
    ...facts,
  };
}

describe('outagesOf', () => {
  it('measures from the report to the end, of faults that were done', () => {
    const outages = outagesOf([
      call({}),
      call({ state: 'withdrawn' }),
      call({ state: 'open', closedAt: null }),
    ]);
    expect(outages.map(({ minutes }) => minutes)).toEqual([1530]);
  });

  it('is never below zero, as for a call written down after the work', () => {
    expect(outagesOf([call({ closedAt: '2031-05-05T11:00:00Z' })])[0]?.minutes).toBe(0);
  });
});

describe('lengthText', () => {
  it.each([
    [40, '40 min'],
    [130, '2 h'],
    [1440, '1 day'],
    [1530, '1 day 1 h'],
    [4500, '3 days 3 h'],
  ])('calls %s minutes %s', (minutes, words) => expect(lengthText(minutes)).toBe(words));
});
