import { type StoreSummary } from './floors-api';

/** How many machines take money now, of how many: one that runs with a fault still earns. */
interface Earning {
  readonly earning: number;
  readonly all: number;
}

export function earningOf(stores: readonly Pick<StoreSummary, 'machines'>[]): Earning {
  let earning = 0;
  let still = 0;
  for (const { machines } of stores) {
    earning += machines.up + machines.degraded;
    still += machines.down + machines.lockedOut;
  }
  return { earning, all: earning + still };
}
