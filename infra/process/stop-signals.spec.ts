import { stopSignals } from './stop-signals';

function pressed(...times: number[]): string[] {
  const done: string[] = [];
  let time = 0;
  const onSignal = stopSignals({
    stop: () => done.push('stop'),
    force: () => done.push('force'),
    now: () => time,
  });
  for (time of times) onSignal();
  return done;
}

describe('stopSignals', () => {
  it('stops in order when asked once', () => {
    expect(pressed(0)).toEqual(['stop']);
  });

  it('takes the same press, passed on by npm, for one', () => {
    expect(pressed(1_000, 1_001)).toEqual(['stop']);
  });

  it('forces when somebody asks again', () => {
    expect(pressed(1_000, 1_001, 2_500)).toEqual(['stop', 'force']);
  });
});
