import { stateWords, windowWords, workWords } from './visit-words';

const readAs = { locale: 'en-GB', zone: 'America/Chicago' };

describe('a visit in words', () => {
  it('tells its window on the shop’s clock', () => {
    const window = { from: '2031-05-06T15:30:00Z', until: '2031-05-06T17:00:00Z' };
    expect(windowWords({ window }, readAs)).toBe('10:30 to 12:00');
    expect(windowWords({ window: null }, readAs)).toBe('any time');
  });

  it.each([
    [['A-03', 'A-04'], 'ignored', null, 'A-03, A-04'],
    [['A-01', 'A-02', 'A-03', 'A-04', 'A-05'], '', null, '5 machines'],
    [[], '', 'round', 'round'],
    [[], 'Look at the supply', null, 'Look at the supply'],
  ])('tells what it is for: %j %s', (bays, reason, roundId, words) => {
    expect(workWords({ bays, reason, roundId })).toBe(words);
  });

  it('says when a ticket is still to be signed off', () => {
    expect(stateWords({ state: 'completed', ticket: null })).toBe('completed, not signed off');
    expect(stateWords({ state: 'completed', ticket: { id: 't', number: 1 } })).toBe('completed');
    expect(stateWords({ state: 'in_process', ticket: null })).toBe('in process');
  });
});
