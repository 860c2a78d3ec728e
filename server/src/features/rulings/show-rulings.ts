import { addUp, otherOutcomes } from '@lib/domain';
import { type Context } from '../../core/context';
import { withTenant } from '../../core/database/tenancy';
import { type AnswerOf } from '../../core/http/route';
import { problem } from '../../core/problems/problem';
import { standingOf, storedRulings, type Standing, type StoredRuling } from './decisions';
import { type CaseJob } from './read-case';
import { type RuledLine } from './ruled-line';
import { NoCase, type VisitCase, visitCase } from './visit-case';

type Shown = AnswerOf<'rulings.show'>;
type ShownLine = Shown['jobs'][number]['lines'][number];

/** A visit's lines with who bears each, as they stand now. */
export interface RuledVisit extends VisitCase {
  standings: Map<string, Standing>;
}

/** The case of a visit with what was decided on it, or a problem in plain words. */
export async function ruledVisit(context: Context, visitId: string): Promise<RuledVisit> {
  const theCase = await visitCase(context, visitId);
  if (theCase instanceof NoCase) throw problem('conflict', theCase.why);
  return withStandings(theCase, await storedRulings(context, visitId));
}

export function withStandings(
  theCase: VisitCase,
  stored: ReadonlyMap<string, StoredRuling>,
): RuledVisit {
  const standings = new Map(
    theCase.lines.map((line) => [line.lineKey, standingOf(line, stored.get(line.lineKey))]),
  );
  return { ...theCase, standings };
}

export function standing(visit: RuledVisit, line: RuledLine): Standing {
  return visit.standings.get(line.lineKey) as Standing;
}

export function showRulings(context: Context, visitId: string): Promise<Shown> {
  return withTenant(context, async () => presentRulings(await ruledVisit(context, visitId)));
}

export function presentRulings(ruled: RuledVisit): Shown {
  const { visit, shop, edition, jobs, lines } = ruled;
  const shown = lines.map((line) => ({ jobId: line.jobId, line: presentLine(ruled, line) }));
  const worth = (bearer: string) =>
    addUp(shown.filter(({ line }) => line.bearer === bearer).map(({ line }) => line.list));
  const ours = shown.filter(({ line }) => line.bearer === 'shop' || line.bearer === 'goodwill');
  return {
    visit: {
      id: visit.id,
      number: visit.number,
      on: visit.workedOn,
      store: { id: visit.storeId, name: visit.storeName },
      client: { id: visit.clientId, name: visit.clientName },
      tech: visit.techName,
      ticketId: visit.ticketId,
    },
    currency: shop.currency,
    edition: { id: edition.id, number: edition.number },
    waiting: shown.filter(({ line }) => line.waiting).length,
    jobs: jobs.map((job) => ({
      ...presentJob(ruled, job),
      lines: shown.filter(({ jobId }) => jobId === job.id).map(({ line }) => line),
    })),
    totals: {
      list: addUp(shown.map(({ line }) => line.list)),
      charged: worth('store'),
      shop: worth('shop'),
      supplier: worth('supplier'),
      contract: worth('contract'),
      goodwill: worth('goodwill'),
      ourCost: addUp(ours.map(({ line }) => line.cost)),
    },
  };
}

function presentJob({ causes }: RuledVisit, job: CaseJob): Omit<Shown['jobs'][number], 'lines'> {
  const cause = job.causedByJobId === null ? undefined : causes.get(job.causedByJobId);
  return {
    jobId: job.id,
    position: job.position,
    machine: { id: job.machineId, bay: job.bay, kind: job.kind },
    symptom: job.symptom || null,
    finding: job.finding,
    findingCode: job.findingCode,
    category: job.category,
    cause: job.cause,
    action: job.action,
    result: job.result,
    mark: job.mark,
    markWords: job.markWords,
    markedBy: job.markedBy,
    causedBy: cause
      ? { jobId: cause.jobId, reference: cause.reference, words: cause.action }
      : null,
  };
}

function presentLine(ruled: RuledVisit, line: RuledLine): ShownLine {
  const { proposed, decision, bearer, waiting } = standing(ruled, line);
  const ticketed = ruled.visit.ticketId !== null;
  return {
    lineKey: line.lineKey,
    kind: line.kind,
    description: line.description,
    unit: line.unit,
    quantityMilli: line.quantityMilli,
    unitPrice: line.unitPrice,
    discount: line.discount,
    list: line.list,
    cost: line.cost,
    priceReasons: line.reasons,
    proposed: {
      bearer: proposed.bearer,
      needsConfirmation: proposed.needsConfirmation,
      reasons: proposed.reasons.map(({ code, words, decides }) => ({ code, words, decides })),
    },
    basis: line.basis,
    decision: decision && decision.step !== 'proposed' ? presentDecision(decision) : null,
    bearer,
    waiting: waiting && !ticketed,
    outcomes: otherOutcomes(line),
  };
}

function presentDecision(decision: StoredRuling): ShownLine['decision'] {
  return {
    step: decision.step === 'overruled' ? 'overruled' : 'confirmed',
    bearer: decision.bearer,
    why: decision.why,
    by: decision.byName ?? '',
    at: decision.at.toISOString(),
  };
}
