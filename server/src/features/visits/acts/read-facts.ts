import { type Act } from '@lib/contracts';
import { type Context } from '../../../core/context';
import { type Bind, rows } from '../../../core/database/tenancy';
import { ticketName } from '../../statements/document-names';
import { type DatedAct, type MachineFact, type VisitFacts } from './visit-record';

/** The visit that acts are recorded on, locked for the transaction. */
export interface VisitToRecord {
  id: string;
  clientId: string;
  storeId: string;
  state: string;
  techMembershipId: string | null;
  techName: string | null;
  ticketNumber: number | null;
  version: number;
}

const dayMs = 86_400_000;

/** All that the arriving acts name, looked up at once. */
export async function readFacts(
  context: Context,
  visit: VisitToRecord,
  acts: readonly Act[],
): Promise<VisitFacts> {
  const { shopId } = context;
  const of: Bind = { shopId, visitId: visit.id, storeId: visit.storeId, clientId: visit.clientId };
  const named = (pick: (act: Act) => string | null | undefined) =>
    acts.map(pick).filter((id): id is string => typeof id === 'string');

  const jobIds = named((act) => (act.kind === 'job_opened' ? act.payload.jobId : null));
  const partUseIds = named((act) => (act.kind === 'part_used' ? act.payload.partUseId : null));
  const itemIds = named((act) => ('openItemId' in act.payload ? act.payload.openItemId : null));
  return {
    cancelled: visit.state === 'cancelled',
    latest: context.now.getTime() + dayMs,
    ticket: visit.ticketNumber === null ? null : ticketName(visit.ticketNumber),
    machines: await machinesOf(of),
    callIds: await thoseOf(
      `select id from calls where shop_id = $shopId and store_id = $storeId
         and state in ('open', 'planned') and id = any ($ids::uuid[])`,
      of,
      named((act) => (act.kind === 'job_opened' ? act.payload.callId : null)),
    ),
    partIds: await thoseOf(
      'select id from parts where shop_id = $shopId and id = any ($ids::uuid[])',
      of,
      named((act) => (act.kind === 'part_used' ? act.payload.partId : null)),
    ),
    causeIds: await thoseOf(
      `select id from jobs where shop_id = $shopId and client_id = $clientId
         and visit_id <> $visitId and result is not null and id = any ($ids::uuid[])`,
      of,
      named((act) => (act.kind === 'warranty_marked' ? act.payload.causedByJobId : null)),
    ),
    takenIds: await thoseOf(
      `select id from jobs
         where shop_id = $shopId and id = any ($ids::uuid[]) and visit_id <> $visitId
       union select u.id from part_uses u join jobs j on j.shop_id = u.shop_id and j.id = u.job_id
         where u.shop_id = $shopId and u.id = any ($ids::uuid[]) and j.visit_id <> $visitId
       union select id from open_items
         where shop_id = $shopId and id = any ($ids::uuid[]) and visit_id <> $visitId`,
      of,
      [...jobIds, ...partUseIds, ...itemIds],
    ),
    openItemIds: await thoseOf(
      `select id from open_items
       where shop_id = $shopId and store_id = $storeId and id = any ($ids::uuid[])`,
      of,
      itemIds,
    ),
    photoOwners: await photoOwners(
      shopId,
      named((act) => (act.kind === 'photo' ? act.payload.attachmentId : null)),
    ),
    // Jobs that were ruled on, or that another job names as its cause.
    keptJobIds: await thoseOf(
      `select j.id from jobs j where j.shop_id = $shopId and j.id = any ($ids::uuid[])
         and (exists (select 1 from rulings r where r.shop_id = j.shop_id
             and r.visit_id = j.visit_id and r.job_id = j.id)
           or exists (select 1 from jobs o where o.shop_id = j.shop_id
             and o.client_id = j.client_id and o.caused_by_job_id = j.id))`,
      of,
      named((act) => (act.kind === 'job_dropped' ? act.payload.jobId : null)),
    ),
  };
}

/** Which of these ids the query finds; most deliveries name none of most kinds, and ask nothing. */
async function thoseOf(sql: string, of: Bind, ids: readonly string[]): Promise<Set<string>> {
  if (ids.length === 0) return new Set();
  const found = await rows<{ id: string }>(sql, { ...of, ids });
  return new Set(found.map((each) => each.id));
}

async function machinesOf(of: Bind): Promise<Map<string, MachineFact>> {
  const machines = await rows<MachineFact & { id: string }>(
    `select id, bay, kind, energy, state = 'retired' as retired from machines
     where shop_id = $shopId and store_id = $storeId`,
    { shopId: of.shopId, storeId: of.storeId },
  );
  return new Map(machines.map((machine) => [machine.id, machine]));
}

async function photoOwners(shopId: string, photoIds: string[]): Promise<Map<string, string>> {
  if (photoIds.length === 0) return new Map();
  const photos = await rows<{ id: string; ownerId: string }>(
    `select id, owner_id as "ownerId" from attachments
     where shop_id = $shopId and id = any ($photoIds::uuid[])`,
    { shopId, photoIds },
  );
  return new Map(photos.map((photo) => [photo.id, photo.ownerId]));
}

interface StoredRow {
  id: string;
  kind: Act['kind'];
  payload: Act['payload'];
  deviceAt: Date;
  seq: number;
  membershipId: string;
  name: string;
}

/** What was recorded on the visit before. */
export async function storedActs(context: Context, visitId: string): Promise<DatedAct[]> {
  const stored = await rows<StoredRow>(
    `select a.id, a.kind, a.payload, a.device_at as "deviceAt", a.seq,
       a.by_membership_id as "membershipId", m.name
     from acts a join memberships m on m.shop_id = a.shop_id and m.id = a.by_membership_id
     where a.shop_id = $shopId and a.visit_id = $visitId order by a.device_at, a.seq`,
    { shopId: context.shopId, visitId },
  );
  return stored.map(({ id, kind, payload, deviceAt, seq, membershipId, name }) => ({
    act: { id, kind, at: deviceAt.toISOString(), payload } as Act,
    at: deviceAt.getTime(),
    seq,
    by: { membershipId, name },
  }));
}
