import { type Job } from '../../core/jobs/work';
import { sendDeliveriesJob } from './send-deliveries';

export const deliveriesJobs: Job[] = [{ ...sendDeliveriesJob, atOnce: 2 }];
