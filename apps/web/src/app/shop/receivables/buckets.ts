import { type Buckets } from './receivables-api';

/** By days past due, from what is not due yet to what is long overdue. */
export const buckets: readonly { key: keyof Buckets; head: string; late: boolean }[] = [
  { key: 'current', head: 'Not due', late: false },
  { key: 'days1To30', head: '1–30 days', late: true },
  { key: 'days31To60', head: '31–60', late: true },
  { key: 'days61To90', head: '61–90', late: true },
  { key: 'over90', head: 'Over 90', late: true },
  { key: 'credit', head: 'Credit', late: false },
];
