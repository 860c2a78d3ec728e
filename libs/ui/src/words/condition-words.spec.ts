import { conditionWords } from './condition-words';

const condition = {
  id: 'c',
  kind: 'access',
  machine: null,
  words: 'Folding table shuts in bank A',
  extraMinutes: 0,
  tool: '',
} as const;

describe('a condition in words', () => {
  it('says what it is, what it costs in time, and what to bring', () => {
    const all = {
      ...condition,
      machine: { id: 'm', bay: 'A-06' },
      extraMinutes: 20,
      tool: 'long bar',
    };
    expect(conditionWords(all).words).toBe(
      'A-06: Folding table shuts in bank A. 20 min more. Bring: long bar.',
    );
  });

  it('says no more than there is', () => {
    expect(conditionWords(condition)).toEqual({
      id: 'c',
      hazard: false,
      words: 'Folding table shuts in bank A.',
    });
    const words = 'A-06 hangs on a makeshift lead!';
    expect(conditionWords({ ...condition, kind: 'hazard', words })).toMatchObject({
      hazard: true,
      words,
    });
  });
});
