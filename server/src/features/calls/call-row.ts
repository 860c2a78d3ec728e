import { type CallState, type MachineKind, type Symptom, type VisitState } from '@lib/contracts';
import { instantOrNull } from '../../core/database/times';
import { type AnswerOf } from '../../core/http/route';

type Call = AnswerOf<'calls.list'>['items'][number];

/** A call as the queries below read it. */
export interface CallRow {
  id: string;
  number: number;
  storeId: string;
  storeName: string;
  clientId: string;
  clientName: string;
  machineId: string | null;
  bay: string | null;
  kind: MachineKind | null;
  make: string | null;
  model: string | null;
  symptom: Symptom;
  words: string;
  state: CallState;
  reportedBy: string;
  reportedVia: Call['reportedVia'];
  reportedAt: Date;
  closedAt: Date | null;
  visitId: string | null;
  visitNumber: number | null;
  visitState: VisitState | null;
  plannedOn: string | null;
  windowStart: Date | null;
  windowEnd: Date | null;
  version: number;
}

export const callFrom = `calls k
  join stores s on s.shop_id = k.shop_id and s.id = k.store_id
  join clients c on c.shop_id = k.shop_id and c.id = k.client_id
  left join machines m on m.shop_id = k.shop_id and m.id = k.machine_id
  left join visits v on v.shop_id = k.shop_id and v.id = k.visit_id`;

export const callColumns = `k.id, k.number, k.store_id as "storeId", s.name as "storeName",
  k.client_id as "clientId", c.name as "clientName", m.id as "machineId", m.bay, m.kind, m.make,
  m.model, k.symptom, k.words, k.state, k.reported_by as "reportedBy",
  k.reported_via as "reportedVia", k.created_at as "reportedAt", k.closed_at as "closedAt",
  v.id as "visitId", v.number as "visitNumber", v.state as "visitState",
  v.planned_on as "plannedOn", v.window_start as "windowStart", v.window_end as "windowEnd",
  k.version`;

export function presentCall(row: CallRow): Call {
  return {
    id: row.id,
    number: row.number,
    store: { id: row.storeId, name: row.storeName },
    client: { id: row.clientId, name: row.clientName },
    machine: machineOf(row),
    symptom: row.symptom,
    words: row.words,
    state: row.state,
    reportedBy: row.reportedBy,
    reportedVia: row.reportedVia,
    reportedAt: row.reportedAt.toISOString(),
    closedAt: instantOrNull(row.closedAt),
    visit: visitOf(row),
    version: row.version,
  };
}

function machineOf({ machineId, bay, kind, make, model }: CallRow): Call['machine'] {
  if (machineId === null || bay === null || kind === null) return null;
  return { id: machineId, bay, kind, make: make ?? '', model: model ?? '' };
}

function visitOf(row: CallRow): Call['visit'] {
  const { visitId, visitNumber, visitState, plannedOn } = row;
  if (visitId === null || visitNumber === null || !visitState || plannedOn === null) return null;
  return {
    id: visitId,
    number: visitNumber,
    state: visitState,
    plannedOn,
    window: windowOf(row.windowStart, row.windowEnd),
  };
}

/** The promised hours of arrival, when both ends are known. */
export function windowOf(
  from: Date | null,
  until: Date | null,
): { from: string; until: string } | null {
  return from && until ? { from: from.toISOString(), until: until.toISOString() } : null;
}
