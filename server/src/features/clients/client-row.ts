import { type Context } from '../../core/context';
import { instantOrNull } from '../../core/database/times';
import { type AnswerOf } from '../../core/http/route';

type Summary = AnswerOf<'clients.list'>['items'][number];
type Client = AnswerOf<'clients.show'>;

export interface ClientRow extends Omit<Client, 'endedAt'> {
  endedAt: Date | null;
}

/** For an attendant, whom other stores of the client do not concern, the counts are of the one store. */
export const clientColumns = `c.id, c.number, c.name, c.terms_days as "termsDays",
  c.tax_exempt as "taxExempt", c.tax_exempt_reference as "taxExemptReference", c.overrides, c.note,
  c.ended_at as "endedAt", c.version,
  (select count(*)::int from stores s
   where s.shop_id = c.shop_id and s.client_id = c.id and s.ended_at is null
     and ($ownStoreId::uuid is null or s.id = $ownStoreId::uuid)) as stores,
  (select count(*)::int from machines m
   where m.shop_id = c.shop_id and m.client_id = c.id and m.state <> 'retired'
     and ($ownStoreId::uuid is null or m.store_id = $ownStoreId::uuid)) as machines,
  (select count(*)::int from machines m where m.shop_id = c.shop_id and m.client_id = c.id
   and ($ownStoreId::uuid is null or m.store_id = $ownStoreId::uuid)
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

/**
 * People of the client see neither what was agreed on prices nor the shop's own note, and an
 * attendant nothing of money at all.
 */
export function presentClient(context: Context, row: ClientRow): Client {
  const ofShop = context.clientId === null;
  const ofMoney = context.storeId === null;
  return {
    ...presentClientSummary(row),
    termsDays: ofMoney ? row.termsDays : null,
    taxExempt: ofMoney && row.taxExempt,
    taxExemptReference: ofMoney ? row.taxExemptReference : '',
    overrides: ofShop ? row.overrides : null,
    note: ofShop ? row.note : null,
  };
}
