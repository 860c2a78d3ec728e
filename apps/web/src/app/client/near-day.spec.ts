import { nearDay } from './near-day';

describe('nearDay', () => {
  it.each([
    ['2031-05-05', 'Yesterday'],
    ['2031-05-06', 'Today'],
    ['2031-05-07', 'Tomorrow'],
    ['2031-05-08', 'Thu, May 8'],
    ['2031-05-04', 'Sun, May 4'],
    ['2030-05-06', 'Mon, May 6, 2030'],
  ])('calls %s, seen from the 6th, %s', (day, words) => {
    expect(nearDay(day, '2031-05-06', 'en-US')).toBe(words);
  });
});
