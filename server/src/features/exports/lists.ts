import { decimalFromAmount, tradeDayOf } from '@lib/domain';
import { type ShopFacts } from '../../core/shop-facts';
import { spoken } from '../imports/cells';
import { columnsOf } from '../imports/columns';

type Row = Record<string, string | number | boolean | Date | null>;

/** A list as it is given out: where its rows come from, and what stands in each cell. */
export interface ExportedList {
  headers: string[];
  /** The columns of the query, in the order of the headers. */
  keys: string[];
  select: string;
  shopColumn: string;
  /** Not null for rows that ended. */
  ended: string;
  /** Columns of text the rows are ordered by; the id makes the order total. */
  sort: string[];
  id: string;
  /** How a value is written where its kind does not say so. */
  write?: Record<string, (value: string | number, shop: ShopFacts) => string>;
}

const money = (value: string | number, shop: ShopFacts) =>
  decimalFromAmount(Number(value), shop.currency);
const word = (value: string | number) => spoken(String(value));

function shared(kind: keyof typeof columnsOf): Pick<ExportedList, 'headers' | 'keys'> {
  return {
    headers: columnsOf[kind].map((column) => column.header),
    keys: columnsOf[kind].map((column) => column.key),
  };
}

const clients: ExportedList = {
  headers: [
    'Client number',
    'Client name',
    'Terms in days',
    'Tax exempt',
    'Tax certificate',
    'Note',
    'Stores',
    'Machines',
    'Ended on',
  ],
  keys: [
    'number',
    'name',
    'termsDays',
    'taxExempt',
    'taxExemptReference',
    'note',
    'stores',
    'machines',
    'endedOn',
  ],
  select: `select c.number, c.name, c.terms_days as "termsDays", c.tax_exempt as "taxExempt",
    c.tax_exempt_reference as "taxExemptReference", c.note, c.ended_at as "endedOn",
    (select count(*)::int from stores s where s.shop_id = c.shop_id and s.client_id = c.id
     and s.ended_at is null) as stores,
    (select count(*)::int from machines m where m.shop_id = c.shop_id and m.client_id = c.id
     and m.state <> 'retired') as machines
    from clients c`,
  shopColumn: 'c.shop_id',
  ended: 'c.ended_at',
  sort: ['c.number'],
  id: 'c.id',
};

const stores: ExportedList = {
  ...shared('stores'),
  select: `select c.number as "clientNumber", c.name as "clientName", s.number, s.name, s.address,
    s.hours, s.access_words as "accessWords", s.tax_place as "taxPlace",
    s.trip_place as "tripPlace", s.trip_metres as "tripMetres", p.name as "contactName",
    p.email as "contactEmail", p.phone as "contactPhone", s.ended_at as "endedOn"
    from stores s join clients c on c.shop_id = s.shop_id and c.id = s.client_id
    left join lateral (
      select name, email, phone from contacts where shop_id = s.shop_id and store_id = s.id
        and gets_statements and ended_at is null order by created_at, id limit 1
    ) p on true`,
  shopColumn: 's.shop_id',
  ended: 's.ended_at',
  sort: ['s.number'],
  id: 's.id',
};

const contacts: ExportedList = {
  headers: [
    'Client number',
    'Client name',
    'Store number',
    'Store name',
    'Name',
    'E-mail',
    'Telephone',
    'Gets statements',
    'Gets word of visits',
    'Ended on',
  ],
  keys: [
    'clientNumber',
    'clientName',
    'storeNumber',
    'storeName',
    'name',
    'email',
    'phone',
    'getsStatements',
    'getsVisits',
    'endedOn',
  ],
  select: `select c.number as "clientNumber", c.name as "clientName", s.number as "storeNumber",
    s.name as "storeName", p.name, p.email, p.phone, p.gets_statements as "getsStatements",
    p.gets_visits as "getsVisits", p.ended_at as "endedOn"
    from contacts p join clients c on c.shop_id = p.shop_id and c.id = p.client_id
    left join stores s on s.shop_id = p.shop_id and s.id = p.store_id`,
  shopColumn: 'p.shop_id',
  ended: 'p.ended_at',
  sort: ['p.name'],
  id: 'p.id',
};

const machines: ExportedList = {
  ...shared('machines'),
  select: `select s.number as "storeNumber", m.bay, m.kind, m.energy, m.make, m.model, m.serial,
    m.built_on as "builtOn", m.installed_on as "installedOn", m.volts, m.amps,
    m.vend_price as "vendPrice", m.cycles_a_day as "cyclesADay",
    m.supplier_warranty_until as "supplierWarrantyUntil", m.note, m.state,
    s.name as "storeName", m.sticker_code as "stickerCode",
    case when m.state = 'retired' then m.state_since end as "endedOn"
    from machines m join stores s on s.shop_id = m.shop_id and s.id = m.store_id`,
  shopColumn: 'm.shop_id',
  ended: "nullif(m.state = 'retired' or s.ended_at is not null, false)",
  // Store by store, as somebody walking through would note them.
  sort: ['s.number', 'm.bay'],
  id: 'm.id',
  write: {
    kind: word,
    energy: word,
    state: word,
    vendPrice: money,
    amps: (value) => String(Number(value)),
    cyclesADay: (value) => String(Number(value)),
  },
};

const parts: ExportedList = {
  ...shared('parts'),
  select: `select p.number, p.name, p.category, p.unit_cost as "unitCost",
    p.fixed_price as "fixedPrice", p.makers_part as "makersPart", p.scarce, p.supplier,
    next.number as "supersededBy", p.ended_at as "endedOn"
    from parts p left join parts next on next.shop_id = p.shop_id and next.id = p.superseded_by`,
  shopColumn: 'p.shop_id',
  ended: 'p.ended_at',
  sort: ['p.number'],
  id: 'p.id',
  write: { unitCost: money, fixedPrice: money },
};

export const exportedLists = { clients, stores, contacts, machines, parts };

/** The cells of one row, before they are made safe for a spreadsheet. */
export function cellsOf(list: ExportedList, row: Row, shop: ShopFacts): string[] {
  return list.keys.map((key) => {
    const value = row[key];
    if (value === null || value === undefined) return '';
    if (value instanceof Date) return tradeDayOf(value, shop.zone);
    if (typeof value === 'boolean') return value ? 'yes' : 'no';
    return list.write?.[key]?.(value, shop) ?? String(value);
  });
}
