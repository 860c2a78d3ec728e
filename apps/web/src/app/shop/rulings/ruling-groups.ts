import { type Bearer } from '@lib/contracts/web';
import { type RulingJob, type RulingLine } from './rulings-api';

type Reason = RulingLine['proposed']['reasons'][number];
type Outcome = RulingLine['outcomes'][number];

/** Lines of one job that rest on the same reason: decided in one go, with their figures together. */
export interface RulingGroup {
  /** The lines in it, as one name. */
  readonly key: string;
  readonly job: RulingJob;
  readonly lines: readonly RulingLine[];
  readonly proposed: Bearer;
  /** In the order they were weighed, each once. */
  readonly reasons: readonly Reason[];
  /** Who bears it as things stand; null where its lines differ. */
  readonly bearer: Bearer | null;
  /** Something in it is for the owner to decide. */
  readonly asks: boolean;
  readonly waiting: boolean;
  readonly decision: RulingLine['decision'];
  readonly list: number;
  /** What each bearer would mean for all its lines, the proposed one first. */
  readonly outcomes: readonly Outcome[];
}

/** The groups of a visit's jobs, in the order of jobs and lines. */
export function rulingGroups(jobs: readonly RulingJob[]): RulingGroup[] {
  return jobs.flatMap((job) => {
    const groups = new Map<string, RulingLine[]>();
    for (const line of job.lines) {
      const key = basisOf(line);
      groups.set(key, [...(groups.get(key) ?? []), line]);
    }
    return [...groups.values()].map((lines) => groupOf(job, lines));
  });
}

/** Waiting ones first decided: where a person goes on. */
export function nextToDecide(groups: readonly RulingGroup[]): RulingGroup | undefined {
  return groups.find(({ waiting }) => waiting);
}

/** "2 of 5 to decide": how far the owner is with what was asked of them; '' when nothing was. */
export function progressWords(groups: readonly RulingGroup[], at: RulingGroup): string {
  const asked = groups.filter(({ asks }) => asks);
  const place = asked.findIndex(({ key }) => key === at.key);
  return place < 0 ? '' : `${place + 1} of ${asked.length} to decide`;
}

function groupOf(job: RulingJob, lines: readonly RulingLine[]): RulingGroup {
  const [first] = lines as [RulingLine, ...RulingLine[]];
  const bearers = new Set(lines.map(({ bearer }) => bearer));
  return {
    key: lines.map(({ lineKey }) => lineKey).join(' '),
    job,
    lines,
    proposed: first.proposed.bearer,
    reasons: reasonsOf(lines),
    bearer: bearers.size === 1 ? first.bearer : null,
    asks: lines.some(({ proposed, decision }) => proposed.needsConfirmation || decision),
    waiting: lines.some(({ waiting }) => waiting),
    decision: lines.find(({ decision }) => decision)?.decision ?? null,
    list: sum(lines.map(({ list }) => list)),
    outcomes: outcomesOf(lines, first.proposed.bearer),
  };
}

/** The rule a line's proposal rests on; how it is worded for labour and parts does not matter. */
function basisOf({ proposed }: RulingLine): string {
  const deciding = proposed.reasons.find(({ decides }) => decides);
  return `${proposed.bearer} ${deciding?.code ?? ''}`;
}

function reasonsOf(lines: readonly RulingLine[]): Reason[] {
  const found = new Map<string, Reason>();
  const fullest = [...lines].sort((a, b) => b.proposed.reasons.length - a.proposed.reasons.length);
  for (const reason of fullest.flatMap(({ proposed }) => proposed.reasons)) {
    if (!found.has(reason.words)) found.set(reason.words, reason);
  }
  return [...found.values()];
}

function outcomesOf(lines: readonly RulingLine[], proposed: Bearer): Outcome[] {
  const sums = new Map<Bearer, Outcome>();
  for (const outcome of lines.flatMap(({ outcomes }) => outcomes)) {
    const sofar = sums.get(outcome.bearer);
    sums.set(outcome.bearer, {
      bearer: outcome.bearer,
      charged: outcome.charged + (sofar?.charged ?? 0),
      ourCost: outcome.ourCost + (sofar?.ourCost ?? 0),
      claimed: outcome.claimed + (sofar?.claimed ?? 0),
    });
  }
  return [...sums.values()].sort(
    (a, b) => Number(b.bearer === proposed) - Number(a.bearer === proposed),
  );
}

function sum(amounts: readonly number[]): number {
  return amounts.reduce((total, amount) => total + amount, 0);
}
