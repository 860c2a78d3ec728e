import { type Job } from '../../core/jobs/work';
import { workPlatformEvent } from '../subscription/work-platform-event';
import { stripeEventJob } from './work-stripe-event';

export const paymentsJobs: Job[] = [{ ...stripeEventJob(workPlatformEvent), atOnce: 2 }];
