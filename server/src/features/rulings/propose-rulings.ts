import { v7 as uuid } from 'uuid';
import { type Context } from '../../core/context';
import { withTenant, write } from '../../core/database/tenancy';
import { announce } from '../../core/live/live';
import { goneBasis, standingOf, storedRulings, type StoredRuling } from './decisions';
import { NoCase, type VisitCase, visitCase } from './visit-case';

/**
 * Writes down what the rules propose for each line of a completed visit, as far as it is not written
 * down already. A visit that cannot be priced yet is left for when it can: nothing is lost by it.
 */
export function proposeRulings(context: Context, visitId: string): Promise<void> {
  return withTenant(context, async () => {
    const theCase = await visitCase(context, visitId);
    if (theCase instanceof NoCase || theCase.visit.ticketId !== null) return;
    await storeProposals(context, theCase, await storedRulings(context, visitId));
  });
}

/** Rows for proposals that are new or rest on other facts than the newest row of their line. */
export async function storeProposals(
  context: Context,
  theCase: VisitCase,
  stored: ReadonlyMap<string, StoredRuling>,
): Promise<void> {
  const { visit, lines } = theCase;
  const changed = lines
    .filter((line) => stored.get(line.lineKey)?.basis !== line.basis)
    .map((line) => {
      const { proposed } = standingOf(line, stored.get(line.lineKey));
      return { jobId: line.jobId, ...lineOf(line), ...proposed, basis: line.basis };
    });
  const keys = new Set(lines.map((line) => line.lineKey));
  const gone = [...stored.values()]
    .filter((ruling) => !keys.has(ruling.lineKey) && ruling.basis !== goneBasis)
    .map(({ jobId, lineKey, bearer }) => ({
      jobId,
      lineKey,
      list: 0,
      cost: 0,
      bearer,
      needsConfirmation: false,
      reasons: [],
      basis: goneBasis,
    }));
  const all = [...changed, ...gone].map((ruling) => ({ id: uuid(), ...ruling }));
  if (all.length === 0) return;
  await write(
    `insert into rulings (shop_id, id, visit_id, job_id, line_key, step, bearer, reasons,
       needs_confirmation, list, cost, basis, at)
     select $shopId, r.id, $visitId, r."jobId", r."lineKey", 'proposed', r.bearer, r.reasons,
       r."needsConfirmation", r.list, r.cost, r.basis, $now
     from jsonb_to_recordset($rulings::jsonb) as r (id uuid, "jobId" uuid, "lineKey" text,
       bearer text, reasons jsonb, "needsConfirmation" boolean, list bigint, cost bigint,
       basis text)`,
    {
      shopId: context.shopId,
      visitId: visit.id,
      now: context.now,
      rulings: JSON.stringify(all),
    },
  );
  await announce(context, 'ruling', visit.id);
}

function lineOf({ lineKey, list, cost }: { lineKey: string; list: number; cost: number }) {
  return { lineKey, list, cost };
}
