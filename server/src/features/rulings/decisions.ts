import { type Bearer } from '@lib/contracts';
import { type Reason } from '@lib/domain';
import { type Context } from '../../core/context';
import { rows } from '../../core/database/tenancy';
import { type RuledLine } from './ruled-line';

/** The newest ruling of a line: the rules' proposal, or the owner's word on it. */
export interface StoredRuling {
  lineKey: string;
  jobId: string;
  step: 'proposed' | 'confirmed' | 'overruled';
  bearer: Bearer;
  reasons: Reason[];
  needsConfirmation: boolean;
  basis: string;
  why: string;
  byName: string | null;
  at: Date;
}

/** Marks a line that is not on the visit any more, as after a part was taken off it. */
export const goneBasis = 'gone';

/** The newest ruling of each line of a visit, by line. */
export async function storedRulings(
  context: Context,
  visitId: string,
): Promise<Map<string, StoredRuling>> {
  const stored = await rows<StoredRuling>(
    `select distinct on (r.line_key) r.line_key as "lineKey", r.job_id as "jobId", r.step,
       r.bearer, r.reasons, r.needs_confirmation as "needsConfirmation", r.basis, r.why,
       (select m.name from memberships m where m.shop_id = r.shop_id and m.user_id = r.by_user_id
        order by m.ended_at is not null limit 1) as "byName", r.at
     from rulings r where r.shop_id = $shopId and r.visit_id = $visitId
     order by r.line_key, r.id desc`,
    { shopId: context.shopId, visitId },
  );
  return new Map(stored.map((ruling) => [ruling.lineKey, ruling]));
}

/** How a line stands: what is proposed now, what was decided on it, and what follows. */
export interface Standing {
  proposed: { bearer: Bearer; needsConfirmation: boolean; reasons: Reason[] };
  decision: StoredRuling | null;
  bearer: Bearer;
  waiting: boolean;
}

/**
 * A decision holds while the proposal rests on the same facts. When they have changed, the line is
 * asked about again if anybody had decided on it, so that no word of the owner is dropped in silence.
 */
export function standingOf(line: RuledLine, newest: StoredRuling | undefined): Standing {
  const { bearer, reasons, needsConfirmation } = line.proposal;
  const fresh = newest?.basis !== line.basis;
  if (newest && !fresh) {
    if (newest.step !== 'proposed') {
      const proposed = { bearer, needsConfirmation, reasons };
      return { proposed, decision: newest, bearer: newest.bearer, waiting: false };
    }
    const proposed = {
      bearer,
      needsConfirmation: newest.needsConfirmation,
      reasons: newest.reasons,
    };
    return { proposed, decision: null, bearer, waiting: newest.needsConfirmation };
  }
  const overtaken = newest && newest.step !== 'proposed' ? decidedBefore(newest) : [];
  const asked = needsConfirmation || overtaken.length > 0;
  const proposed = { bearer, needsConfirmation: asked, reasons: [...reasons, ...overtaken] };
  return { proposed, decision: null, bearer, waiting: asked };
}

function decidedBefore({ step, bearer }: StoredRuling): Reason[] {
  const words = `The work was changed after it was ${step} that ${bearer} bears it: look again.`;
  return [{ code: 'decided_before' as Reason['code'], params: { bearer }, words, decides: false }];
}
