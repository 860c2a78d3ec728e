import { coverageWords } from './coverage-words';

const none = { trip: false, labour: false, parts: false, kinds: [] };

describe('coverageWords', () => {
  it('says when repairs are not covered', () => {
    expect(coverageWords(none)).toBe('The rounds alone; repairs are charged as always.');
  });

  it('names what of repairs is covered, and on which machines', () => {
    expect(coverageWords({ ...none, labour: true })).toBe(
      'The rounds, and of repairs labour of every machine.',
    );
    expect(coverageWords({ trip: true, labour: true, parts: true, kinds: ['top_loader'] })).toBe(
      'The rounds, and of repairs the trip, labour and parts of every top loader.',
    );
  });
});
