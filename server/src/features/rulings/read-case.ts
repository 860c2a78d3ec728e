import {
  type Cause,
  type Coverage,
  type FindingCode,
  type JobResult,
  type MachineKind,
  type PartSource,
  type Symptom,
  type VisitState,
  type WarrantyMark,
} from '@lib/contracts';
import { type ClientOverrides, type ContractCoverage } from '@lib/domain';
import { type Context } from '../../core/context';
import { row, rows } from '../../core/database/tenancy';
import { found } from '../../core/problems/problem';
import { workedOnColumn } from '../visits/job-reference';

export interface CaseVisit {
  id: string;
  number: number;
  state: VisitState;
  workedOn: string;
  storeId: string;
  storeName: string;
  clientId: string;
  clientName: string;
  techName: string | null;
  ticketId: string | null;
  overrides: ClientOverrides;
  taxExempt: boolean;
  taxPlace: string;
  tripPlace: string;
  tripMetres: number | null;
}

export async function visitToRule(context: Context, visitId: string): Promise<CaseVisit> {
  return found(
    await row<CaseVisit>(
      `select v.id, v.number, v.state, ${workedOnColumn('v', 'h')}::text as "workedOn",
         s.id as "storeId", s.name as "storeName", c.id as "clientId", c.name as "clientName",
         m.name as "techName", v.ticket_id as "ticketId", c.overrides,
         c.tax_exempt as "taxExempt", s.tax_place as "taxPlace", s.trip_place as "tripPlace",
         s.trip_metres as "tripMetres"
       from visits v
       join shops h on h.id = v.shop_id
       join stores s on s.shop_id = v.shop_id and s.id = v.store_id
       join clients c on c.shop_id = v.shop_id and c.id = v.client_id
       left join memberships m on m.shop_id = v.shop_id and m.id = v.tech_membership_id
       where v.shop_id = $shopId and v.id = $visitId`,
      { shopId: context.shopId, visitId },
    ),
  );
}

export interface CaseJob {
  id: string;
  position: number;
  machineId: string;
  bay: string;
  kind: MachineKind;
  make: string;
  model: string;
  supplierWarrantyUntil: string | null;
  symptom: Symptom | '';
  finding: string;
  findingCode: FindingCode | null;
  category: string | null;
  cause: Cause | null;
  action: string;
  result: JobResult | null;
  minutes: number;
  afterHoursMinutes: number;
  accessMinutes: number;
  mark: WarrantyMark;
  markWords: string;
  markedBy: string;
  causedByJobId: string | null;
  /** What an hour of whoever worked on it costs the shop; where not known, of the visit's tech. */
  costPerHour: number;
}

export function jobsToRule(context: Context, visitId: string): Promise<CaseJob[]> {
  return rows<CaseJob>(
    `select j.id, j.position, j.machine_id as "machineId", m.bay, m.kind, m.make, m.model,
       m.supplier_warranty_until as "supplierWarrantyUntil", j.symptom, j.finding,
       j.finding_code as "findingCode", j.category, j.cause, j.action, j.result, j.minutes,
       j.after_hours_minutes as "afterHoursMinutes", j.access_minutes as "accessMinutes",
       j.warranty_mark as mark, j.mark_words as "markWords", j.marked_by as "markedBy",
       j.caused_by_job_id as "causedByJobId", coalesce(p.cost_per_hour, t.cost_per_hour, 0) as "costPerHour"
     from jobs j
     join machines m on m.shop_id = j.shop_id and m.id = j.machine_id
     join visits v on v.shop_id = j.shop_id and v.id = j.visit_id
     left join crew_profiles p on p.shop_id = j.shop_id and p.membership_id = j.membership_id
     left join crew_profiles t on t.shop_id = v.shop_id and t.membership_id = v.tech_membership_id
     where j.shop_id = $shopId and j.visit_id = $visitId order by j.position`,
    { shopId: context.shopId, visitId },
  );
}

export interface CasePart {
  id: string;
  jobId: string;
  partId: string | null;
  description: string;
  category: string;
  quantityMilli: number;
  unitCost: number;
  fixedPrice: number | null;
  source: PartSource;
}

export function partsToPrice(context: Context, visitId: string): Promise<CasePart[]> {
  return rows<CasePart>(
    `select u.id, u.job_id as "jobId", u.part_id as "partId", u.description, u.category,
       u.quantity_milli as "quantityMilli", u.unit_cost as "unitCost",
       u.fixed_price as "fixedPrice", u.source
     from jobs j join part_uses u on u.shop_id = j.shop_id and u.job_id = j.id
     where j.shop_id = $shopId and j.visit_id = $visitId order by u.id`,
    { shopId: context.shopId, visitId },
  );
}

/**
 * Causing jobs whose own failure was ruled to be a supplier's: what follows from a supplier's
 * defective part is that supplier's too.
 */
export async function causingBearers(
  context: Context,
  jobIds: readonly string[],
): Promise<Map<string, 'supplier'>> {
  if (jobIds.length === 0) return new Map();
  const ruled = await rows<{ jobId: string }>(
    `select distinct job_id as "jobId" from ticket_lines
     where shop_id = $shopId and job_id = any ($jobIds::uuid[]) and bearer = 'supplier'`,
    { shopId: context.shopId, jobIds },
  );
  return new Map(ruled.map(({ jobId }) => [jobId, 'supplier']));
}

/** The maintenance contract in force for the store on the day of the work; the newest of several. */
export async function contractFor(
  context: Context,
  visit: Pick<CaseVisit, 'storeId' | 'workedOn'>,
): Promise<ContractCoverage | null> {
  const contract = await row<{ name: string; coverage: Partial<Coverage> }>(
    `select k.name, k.coverage
     from contract_stores s join contracts k on k.shop_id = s.shop_id and k.id = s.contract_id
     where s.shop_id = $shopId and s.store_id = $storeId and k.ended_at is null
       and k.starts_on <= $on::date and (k.ends_on is null or k.ends_on >= $on::date)
     order by k.starts_on desc, k.number desc limit 1`,
    { shopId: context.shopId, storeId: visit.storeId, on: visit.workedOn },
  );
  if (!contract) return null;
  const { labour, parts, trip, kinds } = contract.coverage;
  return {
    name: contract.name,
    labour: labour ?? false,
    parts: parts ?? false,
    trip: trip ?? false,
    machineKinds: kinds && kinds.length > 0 ? kinds : null,
  };
}
