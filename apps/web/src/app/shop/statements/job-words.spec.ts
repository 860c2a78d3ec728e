import { jobWords } from './job-words';

const money = (amount: number) => `$${(amount / 100).toFixed(2)}`;

describe('jobWords', () => {
  it('tells what was reported, found, done and left, and the coins put in', () => {
    const job = {
      reported: 'won’t spin',
      found: 'Belt worn smooth',
      done: 'Belt fitted',
      result: 'put_right',
      testCoins: 8,
      testAmount: 200,
    } as const;
    expect(jobWords(job, money)).toBe(
      'Reported: won’t spin; found: Belt worn smooth; done: Belt fitted; left: put right; ' +
        '$2.00 of ours went in for tests.',
    );
  });

  it('leaves out what nobody wrote', () => {
    const job = {
      reported: '',
      found: 'Ran a full cycle',
      done: '',
      result: 'nothing_found',
      testCoins: 0,
      testAmount: 0,
    } as const;
    expect(jobWords(job, money)).toBe('Found: Ran a full cycle; left: nothing found.');
  });
});
