import { z } from 'zod';
import { showFilter } from './clients';
import { defineOperations } from './operation';

export const exportKind = z.enum(['clients', 'stores', 'contacts', 'machines', 'parts']);

export const exportOperations = defineOperations({
  'exports.download': {
    method: 'GET',
    path: '/api/exports/:kind',
    summary: 'A whole list as CSV, for a spreadsheet; also while the shop is paused',
    permission: 'exports.read',
    params: z.strictObject({ kind: exportKind }),
    query: z.strictObject({ show: showFilter }),
    answerType: 'text/csv',
  },
});
