import { type Bearer } from '@lib/contracts';
import { v7 as uuid } from 'uuid';
import { record } from '../../core/audit';
import { type Context } from '../../core/context';
import { row, withTenant, write } from '../../core/database/tenancy';
import { type AnswerOf, type InputOf } from '../../core/http/route';
import { announce } from '../../core/live/live';
import { found, invalid, problem } from '../../core/problems/problem';
import { storedRulings } from './decisions';
import { storeProposals } from './propose-rulings';
import { presentRulings, ruledVisit, withStandings } from './show-rulings';
import { type RuledLine } from './ruled-line';

type Shown = AnswerOf<'rulings.confirm'>;
type Asked = InputOf<'rulings.confirm'>['body']['lines'];

/** The owner agrees with what is proposed. */
export function confirmRulings(context: Context, visitId: string, lines: Asked): Promise<Shown> {
  return decide(context, visitId, lines, 'confirmed', (line) => line.proposal.bearer, '');
}

/** The owner decides otherwise, and says why. */
export function overruleRulings(
  context: Context,
  visitId: string,
  { lines, bearer, why }: InputOf<'rulings.overrule'>['body'],
): Promise<Shown> {
  return decide(context, visitId, lines, 'overruled', () => bearer, why);
}

async function decide(
  context: Context,
  visitId: string,
  asked: Asked,
  step: 'confirmed' | 'overruled',
  bearerOf: (line: RuledLine) => Bearer,
  why: string,
): Promise<Shown> {
  return withTenant(context, async () => {
    await lockCompleted(context, visitId);
    const ruled = await ruledVisit(context, visitId);
    const lines = asked.map(({ lineKey, basis }, i) => {
      const line = ruled.lines.find((each) => each.lineKey === lineKey);
      if (!line) {
        throw invalid([{ pointer: `/lines/${i}/lineKey`, detail: 'is no line of this visit' }]);
      }
      if (line.basis !== basis) {
        throw problem('conflict', `The work was changed since: look at ${line.description} again.`);
      }
      return line;
    });
    await storeProposals(context, ruled, await storedRulings(context, visitId));
    const rulings = lines.map((line) => ({
      id: uuid(),
      jobId: line.jobId,
      lineKey: line.lineKey,
      bearer: bearerOf(line),
      reasons: line.proposal.reasons,
      list: line.list,
      cost: line.cost,
      basis: line.basis,
    }));
    await write(
      `insert into rulings (shop_id, id, visit_id, job_id, line_key, step, bearer, reasons, list,
         cost, basis, why, by_user_id, at)
       select $shopId, r.id, $visitId, r."jobId", r."lineKey", $step, r.bearer, r.reasons, r.list,
         r.cost, r.basis, $why, $userId, $now
       from jsonb_to_recordset($rulings::jsonb) as r (id uuid, "jobId" uuid, "lineKey" text,
         bearer text, reasons jsonb, list bigint, cost bigint, basis text)`,
      {
        shopId: context.shopId,
        visitId,
        step,
        why,
        userId: context.userId,
        now: context.now,
        rulings: JSON.stringify(rulings),
      },
    );
    await record(
      context,
      `rulings ${step}`,
      { kind: 'visit', id: visitId },
      {
        lines: lines.map((line) => line.lineKey),
        ...(step === 'overruled' ? { bearer: rulings[0]?.bearer } : {}),
      },
    );
    await announce(context, 'ruling', visitId);
    return presentRulings(withStandings(ruled, await storedRulings(context, visitId)));
  });
}

/** Rulings are the owner's until the ticket stands; before the visit is completed there is nothing to rule. */
async function lockCompleted(context: Context, visitId: string): Promise<void> {
  const visit = found(
    await row<{ state: string; ticketId: string | null }>(
      `select state, ticket_id as "ticketId" from visits
       where shop_id = $shopId and id = $visitId for update`,
      { shopId: context.shopId, visitId },
    ),
  );
  if (visit.ticketId) throw problem('conflict', 'The ticket is signed off: the rulings stand.');
  if (visit.state !== 'completed') throw problem('conflict', 'The visit is not completed yet.');
}
