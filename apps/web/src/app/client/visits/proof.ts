import { counted } from '@lib/ui/words/words';
import { type Job } from './visits-api';

type Tests = Pick<Job, 'testCycles' | 'testCoins' | 'testAmount'>;

/** Coins and money that test cycles put into the machines. */
export interface Tested {
  readonly cycles: number;
  readonly coins: number;
  readonly amount: number;
}

export function testedBy(jobs: readonly Tests[]): Tested {
  return jobs.reduce(
    (sum, job) => ({
      cycles: sum.cycles + job.testCycles,
      coins: sum.coins + job.testCoins,
      amount: sum.amount + (job.testAmount ?? 0),
    }),
    { cycles: 0, coins: 0, amount: 0 },
  );
}

/**
 * What of the takings is not the owner's, so that the box count reconciles; '' when nothing is.
 *
 * @param money writes an amount as the shop writes money
 */
export function testMoneyWords(
  { cycles, coins, amount }: Tested,
  money: (amount: number) => string,
): string {
  if (coins > 0) {
    const worth = amount > 0 ? ` (${money(amount)})` : '';
    return `${counted(coins, 'coin')} in the box ${coins === 1 ? 'is' : 'are'} ours${worth}.`;
  }
  if (amount > 0) return `${money(amount)} of ${counted(cycles, 'test cycle')} is ours.`;
  return '';
}
