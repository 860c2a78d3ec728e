import { type Cause, type FindingCode, type WarrantyMark } from '@lib/contracts/web';
import { type SheetJob } from '../kept/kept';
import { type ActKind, type PayloadOf } from '../outbox/local-act';

/** What a tech can enter on a job's page, but for parts, photos and how the machine is left. */
export interface JobValues {
  readonly code: FindingCode | null;
  readonly category: string;
  readonly finding: string;
  readonly cause: Cause | null;
  readonly action: string;
  readonly minutes: number;
  readonly afterHoursMinutes: number;
  readonly accessMinutes: number;
  readonly cycles: number;
  readonly coins: number;
  readonly amount: number | null;
  readonly mark: WarrantyMark;
  readonly markWords: string;
  readonly causedByJobId: string | null;
}

export type Entry = { [K in ActKind]: { kind: K; payload: PayloadOf<K> } }[ActKind];

export function jobValues(job: SheetJob): JobValues {
  return {
    code: job.findingCode,
    category: job.category ?? '',
    finding: job.finding,
    cause: job.cause,
    action: job.action,
    minutes: job.shop?.minutes ?? 0,
    afterHoursMinutes: job.shop?.afterHoursMinutes ?? 0,
    accessMinutes: job.shop?.accessMinutes ?? 0,
    cycles: job.testCycles,
    coins: job.testCoins,
    amount: job.testAmount,
    mark: job.shop?.mark ?? 'none',
    markWords: job.shop?.markWords ?? '',
    causedByJobId: job.shop?.causedBy?.jobId ?? null,
  };
}

/**
 * The acts that make the job what was entered. Only what the person touched counts, so that what
 * another phone recorded meanwhile is not undone by a page that was open.
 */
export function entriesFor(
  job: SheetJob,
  entered: JobValues,
  touched: ReadonlySet<keyof JobValues>,
): Entry[] {
  const before = jobValues(job);
  const now = merged(before, entered, touched);
  const changed = (...names: (keyof JobValues)[]) =>
    names.some((name) => now[name] !== before[name]);
  const jobId = job.id;
  const entries: Entry[] = [];
  if (changed('code', 'category', 'finding')) {
    const { code, category, finding } = now;
    entries.push(entry('finding', { jobId, code, category: category || null, words: finding }));
  }
  if (changed('cause') && now.cause) entries.push(entry('cause', { jobId, cause: now.cause }));
  if (changed('action')) entries.push(entry('action', { jobId, words: now.action }));
  if (changed('minutes', 'afterHoursMinutes', 'accessMinutes')) {
    const { minutes, afterHoursMinutes, accessMinutes } = now;
    entries.push(entry('minutes', { jobId, minutes, afterHoursMinutes, accessMinutes }));
  }
  if (changed('cycles', 'coins', 'amount')) {
    const { cycles, coins, amount } = now;
    entries.push(entry('test_cycle', { jobId, cycles, coins, amount: amount ?? 0 }));
  }
  if (changed('mark', 'markWords', 'causedByJobId')) {
    const { mark, markWords: words, causedByJobId } = now;
    entries.push(entry('warranty_marked', { jobId, mark, words, causedByJobId }));
  }
  return entries;
}

function merged(
  before: JobValues,
  entered: JobValues,
  touched: ReadonlySet<keyof JobValues>,
): JobValues {
  const names = Object.keys(before) as (keyof JobValues)[];
  return Object.fromEntries(
    names.map((name) => {
      const value = touched.has(name) ? entered[name] : before[name];
      return [name, typeof value === 'string' ? value.trim() : value];
    }),
  ) as unknown as JobValues;
}

function entry<K extends ActKind>(kind: K, payload: PayloadOf<K>): Entry {
  return { kind, payload } as unknown as Entry;
}
