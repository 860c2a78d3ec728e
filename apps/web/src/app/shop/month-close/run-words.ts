import { counted } from '@lib/ui';
import { type Run, type RunItem } from './month-close-api';

/** Whether the server is at work on it. */
export function atWork({ state }: Pick<RunItem, 'state'>): boolean {
  return state === 'building' || state === 'sending';
}

/** How a close stands, for a list of them. */
export function runStateWords({ state }: Pick<RunItem, 'state'>): string {
  switch (state) {
    case 'building':
      return 'statements are being made';
    case 'sending':
      return 'statements are being mailed';
    case 'held':
      return 'held';
    case 'failed':
      return 'not finished for some stores';
    case 'done':
      return 'closed';
  }
}

interface Bar {
  readonly label: string;
  readonly word: string;
  readonly done: number;
  readonly of: number;
  readonly aside?: string;
}

/** The step a close is at: first every statement is made, then they are mailed. */
export function barOf(run: Pick<Run, 'stores' | 'counts' | 'mails'>): Bar {
  const { counts, mails, stores } = run;
  const failed = counts.failed ? `${counts.failed} failed` : undefined;
  if (counts.waiting + counts.built > 0) {
    const done = counts.rendered;
    return { label: 'Making the statements', word: 'made', done, of: stores, aside: failed };
  }
  const asides = [
    mails.uncertain ? `${mails.uncertain} uncertain` : '',
    mails.failed ? `${mails.failed} not sent` : '',
    failed ?? '',
  ].filter(Boolean);
  return {
    label: 'Mailing the statements',
    word: 'mailed',
    done: mails.sent,
    of: mails.total,
    aside: asides.join(', ') || undefined,
  };
}

/** "about 20 s", "about 3 min". */
export function leftWords(seconds: number | null): string | undefined {
  if (seconds === null) return undefined;
  return seconds < 90 ? `about ${seconds} s` : `about ${Math.round(seconds / 60)} min`;
}

/** "First batch: 3 statements, 15 of 15 checks agree". */
export function firstBatchWords({ firstChecked }: Pick<Run, 'firstChecked'>): string {
  const { statements, checks, agree } = firstChecked;
  return `First batch: ${counted(statements, 'statement')}, ${agree} of ${checks} checks agree`;
}
