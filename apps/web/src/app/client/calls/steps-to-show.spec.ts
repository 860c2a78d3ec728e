import { stepsToShow } from './steps-to-show';

const at = '2031-05-06T10:00:00Z';
const step = <S>(name: S, when: string | null = null) => ({ step: name, at: when, words: '' });

describe('stepsToShow', () => {
  it('shows what is still ahead, and where the call stands', () => {
    const steps = stepsToShow([step('reported', at), step('planned', at), step('confirmed')]);
    expect(steps.map(({ step: name, latest }) => [name, latest])).toEqual([
      ['reported', false],
      ['planned', true],
      ['confirmed', false],
    ]);
  });

  it('leaves out what was passed over', () => {
    const steps = stepsToShow([step('reported', at), step('confirmed'), step('done', at)]);
    expect(steps.map(({ step: name }) => name)).toEqual(['reported', 'done']);
  });
});
