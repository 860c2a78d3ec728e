import { type Bearer } from '@lib/contracts/web';
import { counted } from '@lib/ui/words/words';
import { type StatedVisit, type VisitLine } from './statements-api';

interface LineSums {
  readonly list: number;
  readonly charged: number;
  /** Who bears them, each once, in the order they first come. */
  readonly bearers: readonly Bearer[];
}

export function sumsOf(lines: readonly VisitLine[]): LineSums {
  return {
    list: lines.reduce((sum, { list }) => sum + list, 0),
    charged: lines.reduce((sum, { charged }) => sum + charged, 0),
    bearers: [...new Set(lines.map(({ bearer }) => bearer))],
  };
}

/** The month in one line: "5 visits, 11 machines put right, 2 with nothing wrong". */
export function monthInWords(visits: readonly StatedVisit[]): string {
  if (visits.length === 0) return 'No visit this month';
  const jobs = visits.flatMap((visit) => visit.jobs);
  const right = jobs.filter(({ result }) => result === 'put_right' || result === 'replaced').length;
  const nothing = jobs.filter(({ result }) => result === 'nothing_found').length;
  return [
    counted(visits.length, 'visit'),
    right > 0 ? `${counted(right, 'machine')} put right` : '',
    nothing > 0 ? `${nothing} with nothing wrong` : '',
  ]
    .filter(Boolean)
    .join(', ');
}
