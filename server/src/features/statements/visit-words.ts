import { type JobResult } from '@lib/contracts';

interface DoneJob {
  bay: string;
  result: JobResult | null;
}

const phrases: [JobResult, (bays: string) => string][] = [
  ['put_right', (bays) => `Put right: ${bays}.`],
  ['replaced', (bays) => `Replaced: ${bays}.`],
  ['made_safe', (bays) => `Made safe: ${bays}.`],
  ['unfinished', (bays) => `Not finished: ${bays}.`],
  ['nothing_found', (bays) => `${bays} had nothing wrong.`],
];

/** A visit in one or two sentences, for an owner who was not there. */
export function visitWords(jobs: readonly DoneJob[]): string {
  const sentences = phrases.flatMap(([result, phrase]) => {
    const bays = jobs.filter((job) => job.result === result).map((job) => job.bay);
    return bays.length ? [phrase(joined(bays, result))] : [];
  });
  return sentences.join(' ') || 'Visit.';
}

function joined(bays: string[], result: JobResult): string {
  if (result !== 'nothing_found' || bays.length < 2) return bays.join(', ');
  return `${bays.slice(0, -1).join(', ')} and ${bays.at(-1)}`;
}
