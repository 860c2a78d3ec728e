import { systemContext } from '../../core/context';
import { withTenant } from '../../core/database/tenancy';
import { refuseWhilePaused } from '../../core/http/paused';
import { type Job } from '../../core/jobs/work';
import { Problem } from '../../core/problems/problem';
import { sweepRounds } from './sweep-rounds';

/** A paused shop plans nothing; what fell due meanwhile is planned when it goes on. */
async function planUnlessPaused(shopId: string, now: Date): Promise<void> {
  const context = systemContext(shopId, now);
  try {
    await withTenant(context, () => refuseWhilePaused(context));
  } catch (error) {
    if (error instanceof Problem && error.type === 'shop-paused') return;
    throw error;
  }
  await sweepRounds(context);
}

export const contractsJobs: Job[] = [
  {
    queue: 'rounds-plan',
    work: (data) => planUnlessPaused(String(data.shopId), new Date()),
  },
];
