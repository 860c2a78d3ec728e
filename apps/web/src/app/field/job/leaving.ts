import { type JobResult, type MachineState } from '@lib/contracts/web';
import { type SheetJob } from '../kept/kept';

export type LeftState = Exclude<MachineState, 'retired'>;

/** Results that can be true of a machine left so, the usual one first. */
export function resultsFor(state: LeftState): readonly JobResult[] {
  switch (state) {
    case 'up':
      return ['put_right', 'replaced', 'nothing_found', 'unfinished'];
    case 'degraded':
      return ['put_right', 'unfinished', 'replaced', 'nothing_found'];
    case 'down':
      return ['unfinished', 'made_safe'];
    case 'locked_out':
      return ['made_safe', 'unfinished'];
  }
}

/** What keeps a job from being done, in words for the tech; empty when nothing does. */
export function missingFrom(
  job: Pick<SheetJob, 'cause' | 'shop' | 'machine'>,
  left: LeftState | null,
  result: JobResult | null,
): string[] {
  const bay = job.machine.bay;
  const needsCause = result === 'put_right' || result === 'replaced';
  return [
    left ? '' : `Say how ${bay} is left.`,
    left && (!result || !resultsFor(left).includes(result)) ? 'Say what came of it.' : '',
    needsCause && !job.cause ? 'Say what the cause was.' : '',
    job.shop?.minutes ? '' : 'Say how many minutes it took.',
  ].filter(Boolean);
}
