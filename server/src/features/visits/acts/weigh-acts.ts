import { projectAct } from './project-act';
import { type DatedAct, emptyRecord, type VisitFacts, type VisitRecord } from './visit-record';

export interface Weighed {
  record: VisitRecord;
  /** To be stored, in the order they happened. */
  accepted: DatedAct[];
  /** Why, by act. */
  refused: Map<string, string>;
}

/**
 * Lays arriving acts into the record of a visit at the time they happened, whenever they arrive.
 * One that does not apply there, or that would undo what was stored of a later time, is refused and
 * the others go on.
 */
export function weighActs(
  facts: VisitFacts,
  stored: readonly DatedAct[],
  arriving: readonly DatedAct[],
): Weighed {
  let timeline = [...stored].sort(byTime).map((dated) => ({ dated, stored: true }));
  let record = replay(timeline, facts);
  const accepted: DatedAct[] = [];
  const refused = new Map<string, string>();
  for (const dated of [...arriving].sort(byTime)) {
    const refusal = onceAndForAll(dated, facts);
    if (refusal) {
      refused.set(dated.act.id, refusal);
      continue;
    }
    const last = timeline.at(-1);
    if (!last || byTime(last.dated, dated) <= 0) {
      const reason = projectAct(record, dated, facts, false);
      if (reason !== undefined) {
        refused.set(dated.act.id, reason);
        continue;
      }
      timeline.push({ dated, stored: false });
    } else {
      const inserted = [...timeline, { dated, stored: false }].sort((a, b) =>
        byTime(a.dated, b.dated),
      );
      const outcome = tryReplay(inserted, facts);
      if ('reason' in outcome) {
        const own = outcome.dated === dated;
        refused.set(dated.act.id, own ? outcome.reason : 'Later acts of this visit rest on it.');
        continue;
      }
      record = outcome.record;
      timeline = inserted;
    }
    accepted.push(dated);
  }
  return { record, accepted, refused };
}

/** Acts of one instant in the order they came. */
function byTime(a: DatedAct, b: DatedAct): number {
  return a.at - b.at || a.seq - b.seq;
}

/** What refuses an act whatever the record says. */
function onceAndForAll({ act, at }: DatedAct, facts: VisitFacts): string | undefined {
  if (facts.ticket !== null) {
    return `Ticket ${facts.ticket} is signed off: nothing can be added to the visit. Tell the office.`;
  }
  if (facts.cancelled) return 'The visit was cancelled. Tell the office.';
  if (at > facts.latest) return 'The clock of the device is ahead: set it right.';
  if (act.kind === 'job_opened') {
    const { callId, jobId } = act.payload;
    if (facts.takenIds.has(jobId)) return 'The job belongs to another visit.';
    if (callId && !facts.callIds.has(callId)) return 'The call is not of this store.';
  }
  if (act.kind === 'part_used' && facts.takenIds.has(act.payload.partUseId)) {
    return 'The part was used on another visit.';
  }
  if (act.kind === 'handed_over' && facts.takenIds.has(act.payload.openItemId)) {
    return 'The open item belongs to another visit.';
  }
  return undefined;
}

type Timeline = readonly { dated: DatedAct; stored: boolean }[];

function tryReplay(
  timeline: Timeline,
  facts: VisitFacts,
): { record: VisitRecord } | { dated: DatedAct; reason: string } {
  const record = emptyRecord();
  for (const { dated, stored } of timeline) {
    const reason = projectAct(record, dated, facts, stored);
    if (reason !== undefined) return { dated, reason };
  }
  return { record };
}

/** Of acts that were all accepted before. */
function replay(timeline: Timeline, facts: VisitFacts): VisitRecord {
  const record = emptyRecord();
  for (const { dated, stored } of timeline) projectAct(record, dated, facts, stored);
  return record;
}
