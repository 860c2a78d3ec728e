import { type CallState, type VisitState } from '@lib/contracts';
import { instantOrNull } from '../../core/database/times';
import { type AnswerOf } from '../../core/http/route';

type Step = AnswerOf<'calls.show'>['progress'][number];

export interface CallTimes {
  state: CallState;
  reportedAt: Date;
  plannedAt: Date | null;
  closedAt: Date | null;
  visitState: VisitState | null;
  confirmedAt: Date | null;
  arrivedAt: Date | null;
  /** The day of the visit in words, when one is planned. */
  visitDay: string | null;
}

/** How far a call has come, for somebody who waits for the machine. */
export function callProgress(call: CallTimes): Step[] {
  const reported: Step = {
    step: 'reported',
    at: call.reportedAt.toISOString(),
    words: 'Reported to the shop',
  };
  if (call.state === 'withdrawn') {
    const at = instantOrNull(call.closedAt);
    return [reported, { step: 'withdrawn', at, words: 'Taken back' }];
  }
  const planned = call.state !== 'open';
  const day = call.visitDay;
  return [
    reported,
    {
      step: 'planned',
      at: planned ? instantOrNull(call.plannedAt) : null,
      words: planned && day ? `A visit is planned for ${day}` : 'A visit is planned',
    },
    {
      step: 'confirmed',
      at: planned ? instantOrNull(call.confirmedAt) : null,
      words: 'The day is agreed with the store',
    },
    {
      step: 'arrived',
      at: planned ? instantOrNull(call.arrivedAt) : null,
      words: 'Somebody is at the store',
    },
    {
      step: 'done',
      at: call.state === 'closed' ? instantOrNull(call.closedAt) : null,
      words: 'Done',
    },
  ];
}
