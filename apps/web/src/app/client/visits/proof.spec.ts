import { testedBy, testMoneyWords } from './proof';

const dollars = (amount: number) => `$${(amount / 100).toFixed(2)}`;

describe('testMoneyWords', () => {
  it('counts our coins over all machines, with what they are worth', () => {
    const tested = testedBy([
      { testCycles: 1, testCoins: 8, testAmount: 200 },
      { testCycles: 2, testCoins: 8, testAmount: 200 },
    ]);
    expect(testMoneyWords(tested, dollars)).toBe('16 coins in the box are ours ($4.00).');
  });

  it('names no worth to who sees no money', () => {
    const tested = testedBy([{ testCycles: 1, testCoins: 1, testAmount: null }]);
    expect(testMoneyWords(tested, dollars)).toBe('1 coin in the box is ours.');
  });

  it('names money that came by card', () => {
    const tested = testedBy([{ testCycles: 2, testCoins: 0, testAmount: 850 }]);
    expect(testMoneyWords(tested, dollars)).toBe('$8.50 of 2 test cycles is ours.');
  });

  it('says nothing when nothing was put in', () => {
    expect(testMoneyWords(testedBy([]), dollars)).toBe('');
  });
});
