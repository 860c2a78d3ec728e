import { effectWords, runs, stateWords } from './import-words';
import { type Import } from './imports-api';

function of(facts: Partial<Import>): Import {
  return {
    id: 'i',
    kind: 'stores',
    fileName: 'stores.csv',
    state: 'checked',
    rowsTotal: 15,
    rowsDone: 15,
    counts: { new: 12, changed: 3, unchanged: 0, bad: 0 },
    problem: null,
    createdAt: '2031-05-06T10:00:00Z',
    version: 1,
    ...facts,
  };
}

describe('import words', () => {
  it('say what a checked file waits for', () => {
    expect(stateWords(of({}))).toBe('checked, waits to be applied');
    expect(stateWords(of({ counts: { new: 0, changed: 0, unchanged: 0, bad: 2 } }))).toBe(
      '2 rows to put right',
    );
  });

  it('say what applying would do', () => {
    expect(effectWords(of({}))).toBe('12 new stores, 3 changed');
    expect(effectWords(of({ counts: { new: 1, changed: 0, unchanged: 4, bad: 0 } }))).toBe(
      '1 new store, 4 as they are',
    );
    expect(effectWords(of({ counts: { new: 0, changed: 0, unchanged: 0, bad: 0 } }))).toBe(
      'nothing',
    );
  });

  it.each(['waiting', 'checking', 'applying'] as const)('follow it while it is %s', (state) => {
    expect(runs(of({ state }))).toBe(true);
  });

  it.each(['checked', 'applied', 'failed', 'discarded'] as const)('rest when it is %s', (state) => {
    expect(runs(of({ state }))).toBe(false);
  });
});
