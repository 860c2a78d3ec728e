import { visitWords } from './visit-words';

describe('a visit in words', () => {
  it('names the machines by what became of them', () => {
    expect(
      visitWords([
        { bay: 'A-03', result: 'put_right' },
        { bay: 'A-01', result: 'nothing_found' },
        { bay: 'A-04', result: 'put_right' },
      ]),
    ).toBe('Put right: A-03, A-04. A-01 had nothing wrong.');
    expect(
      visitWords([
        { bay: 'A-01', result: 'nothing_found' },
        { bay: 'A-02', result: 'nothing_found' },
        { bay: 'B-07', result: 'unfinished' },
      ]),
    ).toBe('Not finished: B-07. A-01 and A-02 had nothing wrong.');
  });

  it('says something of a visit without a job', () => {
    expect(visitWords([])).toBe('Visit.');
  });
});
