import { type AnswerOf } from '../../core/http/route';
import { instantOrNull } from '../../core/database/times';

type Summary = AnswerOf<'stores.list'>['items'][number];
type Store = AnswerOf<'stores.show'>;

/** A store as the queries below read it; counts of machines stand as columns of their own. */
export interface StoreRow extends Omit<
  Store,
  'client' | 'machines' | 'endedAt' | 'conditions' | 'openItems' | 'openCalls'
> {
  clientId: string;
  clientName: string;
  endedAt: Date | null;
  up: number;
  degraded: number;
  down: number;
  lockedOut: number;
}

export const storeFrom = `stores s join clients c on c.shop_id = s.shop_id and c.id = s.client_id`;

export const storeColumns = `s.id, s.number, s.name, s.address, s.zone, s.hours,
  s.access_words as "accessWords", s.tax_place as "taxPlace", s.trip_place as "tripPlace",
  s.trip_metres as "tripMetres", s.card_value as "cardValue", s.ended_at as "endedAt", s.version,
  c.id as "clientId", c.name as "clientName", counts.*`;

/** One pass over a store's machines for all four counts. */
export const machineCountsOf = `cross join lateral (
  select count(*) filter (where m.state = 'up')::int as up,
    count(*) filter (where m.state = 'degraded')::int as degraded,
    count(*) filter (where m.state = 'down')::int as down,
    count(*) filter (where m.state = 'locked_out')::int as "lockedOut"
  from machines m where m.shop_id = s.shop_id and m.store_id = s.id) counts`;

export function presentStoreSummary(row: StoreRow): Summary {
  return {
    id: row.id,
    number: row.number,
    name: row.name,
    address: row.address,
    client: { id: row.clientId, name: row.clientName },
    machines: {
      up: row.up,
      degraded: row.degraded,
      down: row.down,
      lockedOut: row.lockedOut,
    },
    endedAt: instantOrNull(row.endedAt),
    version: row.version,
  };
}

export function presentStore(
  row: StoreRow,
  more: Pick<Store, 'conditions' | 'openItems' | 'openCalls'>,
): Store {
  return {
    ...presentStoreSummary(row),
    zone: row.zone,
    hours: row.hours,
    accessWords: row.accessWords,
    taxPlace: row.taxPlace,
    tripPlace: row.tripPlace,
    tripMetres: row.tripMetres,
    cardValue: row.cardValue,
    ...more,
  };
}
