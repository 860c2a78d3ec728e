import { wordFor } from '@lib/ui';
import { type Sheet } from '../kept/kept';
import { type Act } from './local-act';

/** An entry in a few words, for the list of what was sent and what was not: "A-04: found, Lock burnt". */
export function actTitle(act: Act, sheet: Sheet | undefined): string {
  const words = titleOf(act, sheet);
  const jobId = 'jobId' in act.payload ? act.payload.jobId : undefined;
  const bay = sheet?.jobs.find(({ id }) => id === jobId)?.machine.bay;
  return bay && act.kind !== 'job_opened' ? `${bay}: ${words}` : capital(words);
}

function titleOf(act: Act, sheet: Sheet | undefined): string {
  switch (act.kind) {
    case 'arrived':
      return 'arrived';
    case 'left':
      return 'left';
    case 'job_opened': {
      const { machineId } = act.payload;
      return `work begun on ${sheet?.machines.find(({ id }) => id === machineId)?.bay ?? 'a machine'}`;
    }
    case 'cautions_ticked':
      return act.payload.cautions.length === 1
        ? '1 caution ticked'
        : `${act.payload.cautions.length} cautions ticked`;
    case 'finding':
      return `found, ${act.payload.words || wordFor(act.payload.code ?? 'nothing written')}`;
    case 'cause':
      return `cause, ${wordFor(act.payload.cause)}`;
    case 'action':
      return `done, ${act.payload.words || 'nothing written'}`;
    case 'minutes':
      return `${act.payload.minutes} minutes`;
    case 'part_used':
      return `part, ${act.payload.description ?? 'from the book'}`;
    case 'part_removed':
      return 'a part taken off again';
    case 'test_cycle':
      return `tested, ${act.payload.cycles} cycles and ${act.payload.coins} coins`;
    case 'photo':
      return 'photo';
    case 'warranty_marked':
      return `marked, ${act.payload.mark === 'none' ? 'no warranty' : wordFor(act.payload.mark)}`;
    case 'nothing_found':
      return 'nothing found';
    case 'job_done':
      return `${wordFor(act.payload.result)}, left ${wordFor(act.payload.machineState)}`;
    case 'job_dropped':
      return 'job dropped';
    case 'handed_over':
      return `handed over, ${act.payload.words}`;
    case 'open_item_done':
      return 'an open item done';
    case 'signed_off':
      return 'signed off';
  }
}

function capital(words: string): string {
  return words.charAt(0).toUpperCase() + words.slice(1);
}
