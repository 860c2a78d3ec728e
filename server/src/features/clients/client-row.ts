import { type Context } from '../../core/context';
import { instantOrNull } from '../../core/database/times';
import { type AnswerOf } from '../../core/http/route';

type Summary = AnswerOf<'clients.list'>['items'][number];
type Client = AnswerOf<'clients.show'>;

export interface ClientRow extends Omit<Client, 'endedAt'> {
  endedAt: Date | null;
}

export const clientColumns = `c.id, c.number, c.name, c.terms_days as "termsDays",
  c.tax_exempt as "taxExempt", c.tax_exempt_reference as "taxExemptReference", c.overrides, c.note,
  c.ended_at as "endedAt", c.version,
  (select count(*)::int from stores s
   where s.shop_id = c.shop_id and s.client_id = c.id and s.ended_at is null) as stores,
  (select count(*)::int from machines m
   where m.shop_id = c.shop_id and m.client_id = c.id and m.state <> 'retired') as machines,
  (select count(*)::int from machines m where m.shop_id = c.shop_id and m.client_id = c.id
   and m.state in ('degraded', 'down', 'locked_out')) as "machinesNotUp"`;

export function presentClientSummary(row: ClientRow): Summary {
  return {
    id: row.id,
    number: row.number,
    name: row.name,
    stores: row.stores,
    machines: row.machines,
    machinesNotUp: row.machinesNotUp,
    endedAt: instantOrNull(row.endedAt),
    version: row.version,
  };
}

/** People of the client see neither what was agreed on prices nor the shop's own note. */
export function presentClient(context: Context, row: ClientRow): Client {
  const ofShop = context.clientId === null;
  return {
    ...presentClientSummary(row),
    termsDays: row.termsDays,
    taxExempt: row.taxExempt,
    taxExemptReference: row.taxExemptReference,
    overrides: ofShop ? row.overrides : null,
    note: ofShop ? row.note : null,
  };
}
