import { clockIn } from './clock-in';

describe('the clock on the wall', () => {
  it.each([
    ['America/Chicago', '2031-05-06T15:30:00Z', '10:30'],
    ['America/Chicago', '2031-01-06T15:30:00Z', '09:30'],
    ['Europe/Vienna', '2031-05-06T22:05:00Z', '00:05'],
    ['Asia/Kathmandu', '2031-05-06T00:00:00Z', '05:45'],
  ])('of %s at %s shows %s', (zone, instant, clock) => {
    expect(clockIn(zone, instant)).toBe(clock);
  });
});
