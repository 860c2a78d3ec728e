import { baysBetween, serialsByBay } from './bays';

describe('bays', () => {
  it('are those from the first to the last', () => {
    expect(baysBetween(3, 6)).toEqual([3, 4, 5, 6]);
    expect(baysBetween(7, 7)).toEqual([7]);
  });

  it.each([
    [6, 3],
    [null, 3],
    [1, null],
    [0, 3],
    [1, 1000],
  ])('are none between %s and %s', (from, until) => {
    expect(baysBetween(from, until)).toEqual([]);
  });

  it('take serial numbers line by line, leaving out where a line is empty', () => {
    expect([...serialsByBay('K-1\n\n K-3 \nK-4', [5, 6, 7])]).toEqual([
      [5, 'K-1'],
      [7, 'K-3'],
    ]);
  });
});
