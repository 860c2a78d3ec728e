import { type Job } from './core/jobs/work';
import { ticketJobs } from './features/tickets/absorb-ticket';
import { platformMailsJobs } from './features/platform-mails/platform-mails.jobs';

/** Everything the worker does, a line a feature. */
export const jobHandlers: Job[] = [...ticketJobs, ...platformMailsJobs];
