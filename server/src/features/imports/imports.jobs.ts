import { type Job } from '../../core/jobs/work';
import { workImport } from './work-import';

const importWork: Job<{ shopId: string; importId: string }> = {
  queue: 'import-work',
  work: ({ shopId, importId }) => workImport(shopId, importId, new Date()),
};

export const importsJobs: Job[] = [importWork];
