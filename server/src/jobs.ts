import { type Job } from './core/jobs/work';

/** Everything the worker does, a line a feature. */
export const jobHandlers: Job[] = [];
