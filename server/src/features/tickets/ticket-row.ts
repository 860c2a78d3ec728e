import { type AnswerOf } from '../../core/http/route';
import { type Context } from '../../core/context';
import { ticketName } from '../statements/document-names';
import { workedOnColumn } from '../visits/job-reference';

export type TicketItem = AnswerOf<'tickets.list'>['items'][number];

export interface TicketRow {
  id: string;
  number: number;
  visitId: string;
  visitNumber: number;
  storeId: string;
  storeName: string;
  clientId: string;
  clientName: string;
  workedOn: string;
  signedOffOn: string;
  signedOffAt: Date;
  signedOffBy: string | null;
  receivedBy: string | null;
  editionId: string;
  editionNumber: number | null;
  currency: string;
  list: number;
  net: number;
  tax: number;
  total: number;
  borneByShop: number;
  ownCost: number;
  absorbedPosted: boolean;
}

export const ticketFrom = `tickets t
  join visits v on v.shop_id = t.shop_id and v.id = t.visit_id
  join stores s on s.shop_id = t.shop_id and s.id = t.store_id
  join clients c on c.shop_id = t.shop_id and c.id = t.client_id`;

/** Editions and crew are the shop's own: people of a client find nothing there. */
export const ticketSelect = `select t.id, t.number, v.id as "visitId", v.number as "visitNumber",
    s.id as "storeId", s.name as "storeName", c.id as "clientId", c.name as "clientName",
    ${workedOnColumn('v', 'h')}::text as "workedOn", t.signed_off_on as "signedOffOn",
    t.signed_off_at as "signedOffAt", v.received_by as "receivedBy",
    (select m.name from memberships m where m.shop_id = t.shop_id and m.user_id = t.signed_off_by
     order by m.ended_at is not null limit 1) as "signedOffBy",
    t.edition_id as "editionId", e.number as "editionNumber", t.currency, t.list, t.net, t.tax,
    t.total, t.borne_by_shop as "borneByShop", t.own_cost as "ownCost",
    t.own_cost = 0 or exists (select 1 from entries p where p.shop_id = t.shop_id
      and p.document_kind = 'absorbed' and p.document_id = t.id) as "absorbedPosted"
  from ${ticketFrom} join shops h on h.id = t.shop_id
  left join editions e on e.shop_id = t.shop_id and e.id = t.edition_id`;

export function presentTicket(context: Context, row: TicketRow): TicketItem {
  return {
    id: row.id,
    number: row.number,
    name: ticketName(row.number),
    visitId: row.visitId,
    visitNumber: row.visitNumber,
    store: { id: row.storeId, name: row.storeName },
    client: { id: row.clientId, name: row.clientName },
    workedOn: row.workedOn,
    signedOffOn: row.signedOffOn,
    currency: row.currency,
    list: row.list,
    net: row.net,
    tax: row.tax,
    total: row.total,
    borneByShop: row.borneByShop,
    ownCost: context.clientId === null ? row.ownCost : null,
  };
}
