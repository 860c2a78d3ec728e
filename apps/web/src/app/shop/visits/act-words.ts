import { counted, minutesText, wordFor } from '@lib/ui';
import { type Visit, type VisitAct } from './visits-api';

/** One act of the record in a sentence, and the machine it is about. */
interface ActWords {
  readonly bay: string | null;
  readonly words: string;
}

/** Ticks that follow one another as one line: a list of eight cautions says no more than their number. */
export function withTicksTogether(acts: readonly VisitAct[]): VisitAct[] {
  const together: VisitAct[] = [];
  for (const act of acts) {
    const before = together.at(-1);
    const same =
      before?.kind === 'cautions_ticked' &&
      act.kind === 'cautions_ticked' &&
      before.by === act.by &&
      before.payload['jobId'] === act.payload['jobId'];
    if (!same) together.push(act);
    else {
      const cautions = [...cautionsOf(before), ...cautionsOf(act)];
      together[together.length - 1] = { ...act, payload: { ...act.payload, cautions } };
    }
  }
  return together;
}

function cautionsOf({ payload }: VisitAct): readonly unknown[] {
  return (payload['cautions'] as readonly unknown[] | undefined) ?? [];
}

type Payload = Readonly<Record<string, unknown>>;

/** The record of a visit for people; kinds this version does not know yet are named as they are. */
export function actWords({ kind, payload }: VisitAct, visit: Visit): ActWords {
  const job = visit.jobList.find(({ id }) => id === payload['jobId']);
  return { bay: job?.machine.bay ?? null, words: words(kind, payload) };
}

function words(kind: string, payload: Payload): string {
  const text = (name: string) => String(payload[name] ?? '');
  const number = (name: string) => Number(payload[name] ?? 0);
  switch (kind) {
    case 'arrived':
      return 'Arrived';
    case 'left':
      return 'Left';
    case 'job_opened':
      return 'Began to work on the machine';
    case 'job_dropped':
      return 'Dropped the job: opened by mistake';
    case 'cautions_ticked':
      return `Ticked ${counted((payload['cautions'] as unknown[] | undefined)?.length ?? 0, 'caution')}`;
    case 'finding':
      return said('Found', [
        payload['code'] ? wordFor(text('code')) : '',
        text('words'),
        payload['category'] ? `of the ${text('category')}` : '',
      ]);
    case 'cause':
      return `Cause: ${wordFor(text('cause'))}`;
    case 'action':
      return said('Done', [text('words')]);
    case 'minutes':
      return said('Took', [
        minutesText(number('minutes')),
        number('accessMinutes') ? `${minutesText(number('accessMinutes'))} to get at it` : '',
        number('afterHoursMinutes')
          ? `${minutesText(number('afterHoursMinutes'))} after hours`
          : '',
      ]);
    case 'part_used':
      return said('Fitted', [
        `${number('quantityMilli') / 1000 || 1} × ${text('description') || 'part of the price book'}`,
        `from ${wordFor(text('source'))}`,
      ]);
    case 'part_removed':
      return 'Took a part off the list again';
    case 'test_cycle':
      return `Tested: ${counted(number('cycles'), 'cycle')}, ${counted(number('coins'), 'coin')}`;
    case 'photo':
      return 'Took a photo';
    case 'warranty_marked':
      return payload['mark'] === 'none'
        ? 'Took the warranty mark off'
        : said(`Marked as ${wordFor(text('mark'))}`, [
            text('words'),
            payload['causedByJobId'] ? 'because of an earlier job' : '',
          ]);
    case 'nothing_found':
      return `Nothing found: ${counted(number('cycles'), 'cycle')} run, ${minutesText(number('minutes'))}`;
    case 'job_done':
      return `Done: ${wordFor(text('result'))}, left ${wordFor(text('machineState'))}`;
    case 'handed_over':
      return said('Handed over', [text('words')]);
    case 'open_item_done':
      return 'Did what was left from an earlier visit';
    case 'signed_off':
      return payload['receivedBy'] ? `Signed off, received by ${text('receivedBy')}` : 'Signed off';
    default:
      return wordFor(kind);
  }
}

function said(what: string, parts: readonly string[]): string {
  const rest = parts.filter(Boolean).join(', ');
  return rest ? `${what}: ${rest}` : what;
}
