import { systemContext } from '../../core/context';
import { type Job } from '../../core/jobs/work';
import { sweepRounds } from './sweep-rounds';

export const contractsJobs: Job[] = [
  {
    queue: 'rounds-plan',
    async work(data) {
      await sweepRounds(systemContext(String(data.shopId), new Date()));
    },
  },
];
