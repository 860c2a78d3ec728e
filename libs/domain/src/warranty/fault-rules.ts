import { daysBetween } from '../calendar/trade-day';
import { type CausingJob } from './case';
import { partDaysFor } from './history';
import { bearerWords, capitalised, causeWords, days, daysEarlier } from './phrases';
import { type Weighing } from './weighing';

/** Whose fault it was, by the tech's word. A mistake of the shop's own is always the shop's. */
export function weighMark(weighing: Weighing): void {
  const { job } = weighing.context;
  // The sentence ends itself, however the tech ended theirs.
  const note = job.markNote ? `: ${job.markNote.replace(/\.$/, '')}` : '';
  const params = { by: job.markedBy, note: job.markNote ?? '' };
  if (job.mark === 'own_mistake') {
    const words = `${job.markedBy} marked it as our own mistake${note}.`;
    weighing.decide('shop', 'marked_own_mistake', params, words);
    weighing.askOwner();
  } else if (job.cause === 'shop_error') {
    const words = `${job.markedBy} recorded our own mistake as the cause${note}.`;
    weighing.decide('shop', 'cause_shop_error', params, words);
    weighing.askOwner();
  } else if (job.mark === 'shop_warranty') {
    const words = `${job.markedBy} marked it as shop warranty${note}.`;
    weighing.note('marked_shop_warranty', params, words);
  }
}

/** The job that brought this one about, as a fact; what follows from it is weighed later. */
export function weighCausingJob(weighing: Weighing): void {
  const { job } = weighing.context;
  const causing = job.causedBy;
  if (!causing) return;
  const ago = daysSince(causing, job.on);
  const params = { job: causing.jobId, ticket: causing.ticketNumber, days: ago };
  const what = causing.work ? `${causing.work}, job` : 'job';
  if (causing.machineId === job.machineId) {
    const words =
      `It was brought about by an earlier job: ${what} ${causing.ticketNumber}, signed off ` +
      `${daysEarlier(ago)} on the same machine.`;
    weighing.note('caused_by_job', params, words);
  } else {
    const words =
      `It was brought about by an earlier job: ${what} ${causing.ticketNumber}, signed off ` +
      `${daysEarlier(ago)} on another machine.`;
    weighing.note('causing_job_on_other_machine', params, words);
    weighing.askOwner();
  }
}

/** What the store bears whatever is warranted, unless it was the shop's own mistake. */
export function weighExclusion(weighing: Weighing): void {
  if (weighing.decided) return;
  const { job, rules } = weighing.context;
  if (!rules.excludedCauses.includes(job.cause)) return;
  const words = `The cause is ${causeWords[job.cause]}, which our warranty leaves out.`;
  weighing.decide('store', 'cause_excluded', { cause: job.cause }, words);
  // The tech points at the shop's work, the cause at the store: somebody must settle it.
  if (job.causedBy) weighing.askOwner();
}

/** A consequential failure is borne by whoever answers for the job that brought it about. */
export function weighConsequence(weighing: Weighing): void {
  const { job } = weighing.context;
  const causing = job.causedBy;
  // Once somebody else is to bear the line, what that job warrants is beside the point.
  if (!causing || (weighing.decided && weighing.bearer !== 'shop')) return;
  noteCausingWarranty(weighing, causing);
  const bearer = causing.bearer ?? 'shop';
  const params = { job: causing.jobId, ticket: causing.ticketNumber, bearer };
  const fact = `It failed through job ${causing.ticketNumber}, so it follows that job`;
  if (weighing.decided) {
    weighing.note('follows_causing_job', params, `${fact}.`);
    return;
  }
  const words = `${fact}: ${bearerWords[bearer]} bears it.`;
  weighing.decide(bearer, 'follows_causing_job', params, words);
  weighing.askOwner();
}

function noteCausingWarranty(weighing: Weighing, causing: CausingJob): void {
  const { context, line } = weighing;
  const ago = daysSince(causing, context.job.on);
  const isPart = line.kind === 'part';
  const category = isPart ? (line.part?.category ?? context.job.component) : null;
  const warranted = isPart ? partDaysFor(context.rules, category) : context.rules.labourDays;
  const name = isPart ? `Parts${category ? ` of class ${category}` : ''} are` : 'Labour is';
  const params = { ticket: causing.ticketNumber, days: ago, warranted };
  const fact =
    `${name} warranted ${days(warranted)} from sign-off; job ${causing.ticketNumber} was ` +
    `signed off ${daysEarlier(ago)}`;
  if (ago <= warranted) {
    weighing.note(isPart ? 'part_in_warranty' : 'labour_in_warranty', params, `${fact}.`);
  } else {
    const words = `${fact}, ${days(ago - warranted)} past that.`;
    weighing.note('causing_job_out_of_warranty', params, words);
  }
}

/** The owner reads cause and consequence; a slip in the dates must not stop the ruling. */
function daysSince(causing: CausingJob, on: string): number {
  return Math.max(0, daysBetween(causing.signedOffOn, on));
}

/** A machine that ran faultlessly: the contract if it covers the line, else the shop's rule. */
export function weighNothingFound(weighing: Weighing): void {
  if (weighing.decided || !isNothingFound(weighing)) return;
  const bearer = weighing.context.rules.nothingFoundBearer;
  const words =
    `Nothing was found and the machine ran when tested; by our rule ${bearerWords[bearer]} ` +
    'bears that.';
  weighing.decide(bearer, 'nothing_found', { bearer }, words);
}

export function isNothingFound({ context: { job } }: Weighing): boolean {
  return job.result === 'nothing_found' || job.cause === 'nothing_found';
}

/** Nobody warrants a fee; a store's own spare is charged to nobody. */
export function weighNeverWarranted(weighing: Weighing): void {
  const { kind, part } = weighing.line;
  if (kind === 'fee' || kind === 'late_charge') {
    const words = `${capitalised(kind === 'fee' ? 'fees' : 'late charges')} are the store’s.`;
    weighing.decide('store', 'never_warranted', { kind }, words);
  } else if (kind === 'part' && part?.source === 'storeroom') {
    if (weighing.decided) {
      const words = 'The part was the store’s own: the shop owes it another.';
      weighing.note('own_part_of_store', {}, words);
    } else {
      const words = 'The part was the store’s own: there is nothing to charge.';
      weighing.decide('store', 'own_part_of_store', {}, words);
    }
  }
}
