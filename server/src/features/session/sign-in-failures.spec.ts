import { waitSeconds } from './sign-in-failures';

describe('waiting after failed sign-ins', () => {
  it('is nothing for a few mistypings, then doubles, and ends growing at a quarter of an hour', () => {
    expect([0, 1, 4].map(waitSeconds)).toEqual([0, 0, 0]);
    expect([5, 6, 7, 8].map(waitSeconds)).toEqual([1, 2, 4, 8]);
    expect(waitSeconds(40)).toBe(900);
  });
});
