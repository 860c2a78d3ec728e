import { type SheetJob } from '../kept/kept';
import { missingFrom, resultsFor } from './leaving';

const job = (cause: SheetJob['cause'], minutes: number) =>
  ({ cause, machine: { bay: 'A-04' }, shop: { minutes } }) as SheetJob;

describe('leaving a machine', () => {
  it('offers only results that can be true', () => {
    expect(resultsFor('locked_out')).toEqual(['made_safe', 'unfinished']);
    expect(resultsFor('down')).not.toContain('put_right');
    expect(resultsFor('up')[0]).toBe('put_right');
    expect(resultsFor('up')).not.toContain('made_safe');
  });

  it.each([
    ['how it is left', job('wear', 10), null, null, ['Say how A-04 is left.']],
    ['a result that goes with it', job('wear', 10), 'up', 'made_safe', ['Say what came of it.']],
    [
      'the cause of what was put right',
      job(null, 10),
      'up',
      'put_right',
      ['Say what the cause was.'],
    ],
    ['the minutes', job('wear', 0), 'up', 'replaced', ['Say how many minutes it took.']],
    ['nothing of a job made safe', job(null, 5), 'locked_out', 'made_safe', []],
    ['nothing of a job put right', job('wear', 5), 'up', 'put_right', []],
  ] as const)('misses %s', (_, of, left, result, missing) => {
    expect(missingFrom(of, left, result)).toEqual(missing);
  });
});
