import { type VisitState } from '@lib/contracts';
import { type Context } from '../../core/context';
import { type Bind } from '../../core/database/tenancy';
import { instantOrNull } from '../../core/database/times';
import { type AnswerOf } from '../../core/http/route';
import { windowOf } from '../calls/call-row';
import { ownClient, ownStore } from '../stores/own-store';

export type VisitItem = AnswerOf<'visits.list'>['items'][number];

/** A visit as the queries below read it. */
export interface VisitRow {
  id: string;
  number: number;
  storeId: string;
  storeName: string;
  address: string;
  clientId: string;
  clientName: string;
  techMembershipId: string | null;
  techName: string | null;
  techInitials: string | null;
  plannedOn: string;
  windowStart: Date | null;
  windowEnd: Date | null;
  state: VisitState;
  reason: string;
  calls: number;
  jobs: number;
  bays: string[];
  arrivedAt: Date | null;
  leftAt: Date | null;
  ticketId: string | null;
  ticketNumber: number | null;
  roundId: string | null;
  receivedBy: string | null;
  version: number;
}

/** What conditions and searches of a list of visits need. */
export const visitFrom = `visits v
  join stores s on s.shop_id = v.shop_id and s.id = v.store_id
  join clients c on c.shop_id = v.shop_id and c.id = v.client_id`;

/** Crew is the shop's own: to people of a client the tech stays without a name. */
const visitMore = `left join memberships t on t.shop_id = v.shop_id and t.id = v.tech_membership_id
  left join crew_profiles p on p.shop_id = v.shop_id and p.membership_id = v.tech_membership_id
  left join tickets k on k.shop_id = v.shop_id and k.id = v.ticket_id`;

const visitColumns = `v.id, v.number, v.store_id as "storeId", s.name as "storeName", s.address,
  v.client_id as "clientId", c.name as "clientName", t.id as "techMembershipId",
  t.name as "techName", p.initials as "techInitials", v.planned_on as "plannedOn",
  v.window_start as "windowStart", v.window_end as "windowEnd", v.state, v.reason,
  v.arrived_at as "arrivedAt", v.left_at as "leftAt", k.id as "ticketId",
  k.number as "ticketNumber", v.round_id as "roundId", v.received_by as "receivedBy", v.version,
  (select count(*)::int from calls x where x.shop_id = v.shop_id and x.visit_id = v.id) as calls,
  (select count(*)::int from jobs j where j.shop_id = v.shop_id and j.visit_id = v.id) as jobs,
  array(select m.bay from machines m where m.shop_id = v.shop_id and m.id in
    (select x.machine_id from calls x where x.shop_id = v.shop_id and x.visit_id = v.id
     union select j.machine_id from jobs j where j.shop_id = v.shop_id and j.visit_id = v.id)
    order by m.bay) as bays`;

export const visitSelect = `select ${visitColumns} from ${visitFrom} ${visitMore}`;

/** Which visits a person may see: an attendant those of the store, a tech their own and unplaced. */
export function ownVisits(context: Context, bind: Bind): string[] {
  const own = [
    ...ownClient(context, 'v.client_id', bind),
    ...ownStore(context, 'v.store_id', bind),
  ];
  if (context.role !== 'tech') return own;
  bind.ownMembershipId = context.membershipId;
  return [...own, '(v.tech_membership_id is null or v.tech_membership_id = $ownMembershipId)'];
}

export function presentVisit(context: Context, row: VisitRow): VisitItem {
  const { ticketId, ticketNumber } = row;
  const seesTicket = context.role !== 'attendant' && ticketId !== null && ticketNumber !== null;
  return {
    id: row.id,
    number: row.number,
    store: { id: row.storeId, name: row.storeName, address: row.address },
    client: { id: row.clientId, name: row.clientName },
    tech: techOf(row),
    plannedOn: row.plannedOn,
    window: windowOf(row.windowStart, row.windowEnd),
    state: row.state,
    reason: row.reason,
    calls: row.calls,
    bays: row.bays,
    jobs: row.jobs,
    arrivedAt: instantOrNull(row.arrivedAt),
    leftAt: instantOrNull(row.leftAt),
    ticket: seesTicket ? { id: ticketId, number: ticketNumber } : null,
    roundId: row.roundId,
    version: row.version,
  };
}

function techOf({ techMembershipId, techName, techInitials }: VisitRow): VisitItem['tech'] {
  if (techMembershipId === null || techName === null) return null;
  return {
    membershipId: techMembershipId,
    name: techName,
    initials: techInitials ?? initialsOf(techName),
  };
}

/** Of a name, where the shop has not chosen any. */
export function initialsOf(name: string): string {
  const letters = name.split(/\s+/).map((part) => part.charAt(0).toUpperCase());
  return letters.length > 1 ? `${letters[0]}${letters.at(-1)}` : name.slice(0, 2).toUpperCase();
}
