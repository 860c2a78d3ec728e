import { createHash } from 'node:crypto';
import { type PriceBook } from '@lib/contracts';
import {
  addDays,
  type EarlierJob,
  type LineToRule,
  PriceBookGap,
  type PricedLine,
  priceVisit,
  proposeRuling,
  type Ruling,
  type RulingContext,
} from '@lib/domain';
import { type Context } from '../../core/context';
import { type ShopFacts, shopFacts } from '../../core/shop-facts';
import { editionInForce } from '../prices/edition-in-force';
import {
  countsFrom,
  type EarlierJobRow,
  earlierJobsById,
  earlierJobsOn,
  longestWindow,
} from '../visits/earlier-jobs';
import {
  causingBearers,
  contractFor,
  type CaseJob,
  type CasePart,
  type CaseVisit,
  jobsToRule,
  partsToPrice,
  visitToRule,
} from './read-case';
import { type RuledLine } from './ruled-line';
import { ticketedLines } from './ticketed-lines';

/** A visit priced and ruled by its price book, as its acts stand now. */
export interface VisitCase {
  visit: CaseVisit;
  shop: ShopFacts;
  edition: { id: string; number: number; book: PriceBook };
  jobs: CaseJob[];
  /** The jobs that the tech says brought others about, by id. */
  causes: Map<string, EarlierJobRow>;
  lines: RuledLine[];
}

/** Why a visit cannot be priced yet, in plain words. */
export class NoCase {
  constructor(readonly why: string) {}
}

/**
 * Prices the visit and proposes who bears each line, from a fixed number of queries. Nothing is
 * written: the same facts come to the same proposals whenever they are asked for.
 */
export async function visitCase(context: Context, visitId: string): Promise<VisitCase | NoCase> {
  const visit = await visitToRule(context, visitId);
  const shop = await shopFacts(context);
  const edition = await editionInForce(context, visit.workedOn);
  if (!edition) return new NoCase(`No price book is in force on ${visit.workedOn}.`);
  const jobs = await jobsToRule(context, visitId);
  const parts = await partsToPrice(context, visitId);
  const { book } = edition;
  const earlier = await earlierJobsOn(context, {
    machineIds: jobs.map((job) => job.machineId),
    since: addDays(visit.workedOn, -longestWindow(book.warranty)),
    visitIds: [visitId],
  });
  const causeIds = jobs.map((job) => job.causedByJobId).filter((id) => id !== null);
  const causes = new Map((await earlierJobsById(context, causeIds)).map((job) => [job.jobId, job]));
  const bearers = await causingBearers(context, causeIds);
  if (visit.ticketId !== null) {
    const lines = await ticketedLines(context, visit.ticketId);
    return { visit, shop, edition, jobs, causes, lines };
  }
  const contract = await contractFor(context, visit);
  try {
    const lines = priceVisit({
      edition: book,
      overrides: visit.overrides,
      store: { place: visit.taxPlace, zone: visit.tripPlace, metres: visit.tripMetres },
      jobs: jobs.map((job) => ({
        jobId: job.id,
        machine: job.bay,
        minutes: job.minutes,
        afterHoursMinutes: job.afterHoursMinutes,
        accessMinutes: job.accessMinutes,
        result: job.result ?? 'unfinished',
        labourCostPerHour: job.costPerHour,
        parts: parts.filter((part) => part.jobId === job.id).map(partToPrice),
      })),
      tripCost: book.tripCost,
      currency: shop.currency,
      locale: shop.locale,
    });
    const ruled = lines.map((line) => {
      const job = jobs.find(({ id }) => id === line.jobId) as CaseJob;
      const part = parts.find(({ id }) => line.lineKey.endsWith(`:part:${id}`)) ?? null;
      const proposal = proposeRuling(toRule(line, part), {
        rules: book.warranty,
        job: jobToRule(job, visit, causes, bearers),
        earlierJobs: earlier.map(earlierJob),
        machineSupplierWarrantyUntil: job.supplierWarrantyUntil,
        contract,
        currency: shop.currency,
        locale: shop.locale,
      });
      return { ...line, proposal, basis: basisOf(line, proposal) };
    });
    return { visit, shop, edition, jobs, causes, lines: ruled };
  } catch (error) {
    if (error instanceof PriceBookGap) return new NoCase(`${error.message}.`);
    throw error;
  }
}

/** Two proposals with the same basis ask the owner the same question. */
function basisOf(line: PricedLine, proposal: Ruling): string {
  const { bearer, needsConfirmation, reasons } = proposal;
  const rest = [line.list, line.cost, bearer, needsConfirmation, reasons.map((r) => r.words)];
  return createHash('sha256').update(JSON.stringify(rest)).digest('base64url').slice(0, 22);
}

function partToPrice(part: CasePart) {
  const { id: partUseId, partId, description, quantityMilli, unitCost, fixedPrice, source } = part;
  return { partUseId, partId, description, quantityMilli, unitCost, fixedPrice, source };
}

function toRule(line: PricedLine, part: CasePart | null): LineToRule {
  return {
    lineKey: line.lineKey,
    kind: line.kind,
    description: line.description,
    list: line.list,
    cost: line.cost,
    part: part && { partId: part.partId, category: part.category || null, source: part.source },
  };
}

function jobToRule(
  job: CaseJob,
  visit: CaseVisit,
  causes: ReadonlyMap<string, EarlierJobRow>,
  bearers: ReadonlyMap<string, 'supplier'>,
): RulingContext['job'] {
  const causing = job.causedByJobId === null ? undefined : causes.get(job.causedByJobId);
  return {
    jobId: job.id,
    machineId: job.machineId,
    machineKind: job.kind,
    on: visit.workedOn,
    // A machine left unfinished may have no known cause yet; wear is the one no rule turns on.
    cause: job.cause ?? 'wear',
    result: job.result ?? 'unfinished',
    component: job.category || null,
    symptom: knownSymptom(job.symptom),
    mark: job.mark,
    markedBy: job.markedBy,
    markNote: job.markWords || null,
    causedBy: causing
      ? {
          jobId: causing.jobId,
          ticketNumber: causing.reference,
          signedOffOn: countsFrom(causing),
          machineId: causing.machineId,
          work: causing.action || null,
          bearer: bearers.get(causing.jobId) ?? null,
        }
      : null,
  };
}

function earlierJob(job: EarlierJobRow): EarlierJob {
  return {
    jobId: job.jobId,
    ticketNumber: job.reference,
    signedOffOn: countsFrom(job),
    machineId: job.machineId,
    component: job.category || null,
    symptom: knownSymptom(job.symptom),
    result: job.result ?? 'unfinished',
    parts: job.parts.map((part) => ({
      partId: part.partId,
      category: part.category || null,
      description: part.description,
      source: part.source as EarlierJob['parts'][number]['source'],
      supplierWarrantyUntil: null,
    })),
  };
}

/** Two calls of `other` need not be the same fault. */
function knownSymptom(symptom: string): string | null {
  return symptom === '' || symptom === 'other' ? null : symptom;
}
