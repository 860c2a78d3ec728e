/** What a plan counts: stores, machines in them, and people of the shop's crew. */
const countedThings = ['stores', 'machines', 'crew'] as const;
export type CountedThing = (typeof countedThings)[number];

export type Counts = Record<CountedThing, number>;

/** `near` from 80 % on, `at` when nothing more can be added. */
export type LimitLevel = 'within' | 'near' | 'at';

export interface LimitNotice {
  counted: CountedThing;
  used: number;
  allowed: number;
  level: LimitLevel;
  /** To be shown as it is; says what still works, because a limit takes nothing away. */
  words: string;
}

const nearPercent = 80;

/** How many of each counted thing a plan allows and a shop uses, in the order of the plan. */
export function limitsNotice(limits: Counts, usage: Counts): LimitNotice[] {
  return countedThings.map((counted) => {
    const allowed = limits[counted];
    const used = usage[counted];
    const level = levelOf(used, allowed);
    return { counted, used, allowed, level, words: wordsOf(counted, used, allowed, level) };
  });
}

/**
 * Whether so many more fit. Asked before adding; what is there already always stays.
 *
 * @param more 1 for one by hand, the number of new rows for an import
 */
export function mayAdd(limits: Counts, usage: Counts, counted: CountedThing, more = 1): boolean {
  return usage[counted] + more <= limits[counted];
}

function levelOf(used: number, allowed: number): LimitLevel {
  if (used >= allowed) return 'at';
  return used * 100 >= allowed * nearPercent ? 'near' : 'within';
}

const names: Record<CountedThing, [one: string, many: string]> = {
  stores: ['store', 'stores'],
  machines: ['machine', 'machines'],
  crew: ['member of your crew', 'members of your crew'],
};

function wordsOf(counted: CountedThing, used: number, allowed: number, level: LimitLevel): string {
  const [one, many] = names[counted];
  const ofPlan = `${used} of ${allowed} ${allowed === 1 ? one : many} in your plan`;
  if (level === 'within') return `${ofPlan}.`;
  if (level === 'near') return `${ofPlan}: ${allowed - used} more can be added.`;
  const kept = 'Everything you have stays and keeps working; a larger plan lets you add more.';
  return `${ofPlan}: no more can be added. ${kept}`;
}
