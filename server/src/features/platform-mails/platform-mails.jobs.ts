import { type Job } from '../../core/jobs/work';
import { sendPlatformMails } from './send-platform-mails';

export const platformMailsJobs: Job[] = [
  {
    queue: 'platform-mails-send',
    work: (_data, { config }) => sendPlatformMails(config.mail),
  },
];
