import { type Job } from './core/jobs/work';
import { platformMailsJobs } from './features/platform-mails/platform-mails.jobs';

/** Everything the worker does, a line a feature. */
export const jobHandlers: Job[] = [...platformMailsJobs];
