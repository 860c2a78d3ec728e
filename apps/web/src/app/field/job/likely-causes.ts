import { type AnswerOf } from '@lib/contracts/web';
import { type EarlierJob, type Sheet, type SheetJob } from '../kept/kept';

export type CauseCandidate = AnswerOf<'jobs.causeCandidates'>['items'][number];

/**
 * Earlier jobs at the store that may have brought this one about, from what the phone took along:
 * for when the server cannot be asked. The same machine speaks most for a job, then the same part,
 * then the same fault.
 */
export function likelyCauses(sheet: Sheet, job: SheetJob): CauseCandidate[] {
  return sheet.earlierJobs
    .filter(({ result }) => result !== 'nothing_found')
    .map((earlier) => ({ earlier, ...likeness(earlier, job, sheet.visit.plannedOn) }))
    .sort((a, b) => b.weight - a.weight || a.daysAgo - b.daysAgo)
    .map(({ earlier, why }) => ({ ...earlier, why }));
}

function likeness(earlier: EarlierJob, job: SheetJob, on: string) {
  const daysAgo = Math.max(0, Math.round((Date.parse(on) - Date.parse(earlier.on)) / 86_400_000));
  const signs: [holds: boolean, weight: number, words: string][] = [
    [earlier.machineId === job.machine.id, 4, 'On the same machine'],
    [same(earlier.category, job.category), 2, `Also worked on: ${earlier.category ?? ''}`],
    [same(earlier.symptom, job.symptom), 1, 'The same fault was reported'],
  ];
  const holding = signs.filter(([holds]) => holds);
  return {
    daysAgo,
    weight: holding.reduce((sum, [, weight]) => sum + weight, 0),
    why: [...holding.map(([, , words]) => words), daysWords(daysAgo)],
  };
}

function same(a: string | null, b: string | null): boolean {
  return a !== null && a !== '' && a === b;
}

function daysWords(days: number): string {
  if (days === 0) return 'The same day';
  return `${days} ${days === 1 ? 'day' : 'days'} earlier`;
}
