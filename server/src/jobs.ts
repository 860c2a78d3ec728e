import { type Job } from './core/jobs/work';
import { ticketJobs } from './features/tickets/absorb-ticket';
import { importsJobs } from './features/imports/imports.jobs';
import { platformMailsJobs } from './features/platform-mails/platform-mails.jobs';
import { contractsJobs } from './features/contracts/contracts.jobs';
import { deliveriesJobs } from './features/deliveries/deliveries.jobs';
import { paymentsJobs } from './features/payments/payments.jobs';
import { statementsJobs } from './features/statements/statements.jobs';
import { sweepJobs } from './features/sweep/sweep';

/** Everything the worker does, a line a feature. */
export const jobHandlers: Job[] = [
  ...ticketJobs,
  ...importsJobs,
  ...platformMailsJobs,
  ...contractsJobs,
  ...deliveriesJobs,
  ...paymentsJobs,
  ...statementsJobs,
  ...sweepJobs,
];
