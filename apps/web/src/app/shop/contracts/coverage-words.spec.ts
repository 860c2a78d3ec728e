import { coverageWords } from './coverage-words';

describe('coverageWords', () => {
  it('names what is paid for and on which machines', () => {
    expect(coverageWords({ labour: true, parts: true, trip: true, kinds: [] })).toBe(
      'Labour, parts and trips of repairs, on every kind of machine.',
    );
    expect(
      coverageWords({ labour: true, parts: false, trip: false, kinds: ['dryer', 'top_loader'] }),
    ).toBe('Labour of repairs, on dryers and top loaders.');
  });

  it('says when it pays for nothing but the rounds', () => {
    expect(coverageWords({ labour: false, parts: false, trip: false, kinds: [] })).toBe(
      'Only the rounds; repairs are charged.',
    );
  });
});
