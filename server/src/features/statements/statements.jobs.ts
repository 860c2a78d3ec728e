import { type Job } from '../../core/jobs/work';
import { buildStatementsJob } from './build-statements';
import { renderStatementsJob } from './render-statements';

export const statementsJobs: Job[] = [
  { ...buildStatementsJob, atOnce: 2 },
  { ...renderStatementsJob, atOnce: 2 },
];
