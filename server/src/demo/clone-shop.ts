import { v7 as uuid } from 'uuid';
import { systemContext } from '../core/context';
import { platformRow, platformRows, rows, withTenant, write } from '../core/database/tenancy';

/** In the order in which rows may refer to each other. */
const tables = [
  'shop_settings',
  'counters',
  'clients',
  'stores',
  'memberships',
  'crew_profiles',
  'contacts',
  'banks',
  'machines',
  'conditions',
  'editions',
  'parts',
  'contracts',
  'contract_stores',
  'visits',
  'rounds',
  'calls',
  'jobs',
  'part_uses',
  'acts',
  'visit_times',
  'open_items',
  'rulings',
  'tickets',
  'ticket_lines',
  'fees',
  'entries',
  'statement_runs',
  'statements',
  'statement_run_stores',
  'statement_documents',
  'payments',
  'allocations',
  'shop_usage',
];
/** Set in a second step, because the two rows refer to each other. */
const later: Record<string, string[]> = { visits: ['ticket_id', 'round_id'] };

/** Copies the first shop under new shop ids until there are `wanted` shops. */
export async function growTo(wanted: number): Promise<void> {
  const model = await platformRow<{ id: string; name: string }>(
    'select id, name from shops order by created_at, id limit 1',
  );
  const there = await platformRow<{ n: number }>('select count(*)::int as n from shops');
  if (!model || !there) throw new Error('There is no shop to copy: fill the demo first.');
  for (let n = there.n + 1; n <= wanted; n++) await copyShop(model.id, `${model.name} ${n}`);
}

/** Ids may stay the same: every key starts with the shop. */
export async function copyShop(modelId: string, name: string): Promise<string> {
  const id = uuid();
  await platformRows(
    `insert into shops (id, name, zone, currency, locale)
     select $id, $name, zone, currency, locale from shops where id = $modelId`,
    { id, name, modelId },
  );
  await platformRows(
    `insert into subscriptions (shop_id, id, plan_id, state, state_since)
     select $id, $row, plan_id, state, state_since from subscriptions where shop_id = $modelId`,
    { id, row: uuid(), modelId },
  );
  const content = new Map<string, object[]>();
  await withTenant(systemContext(modelId, new Date()), async () => {
    for (const table of tables) {
      content.set(
        table,
        await rows(`select to_jsonb(t) as row from ${table} t where shop_id = $modelId`, {
          modelId,
        }),
      );
    }
  });
  await withTenant(systemContext(id, new Date()), async () => {
    for (const table of tables) await copyRows(table, id, content.get(table) ?? []);
    for (const [table, columns] of Object.entries(later))
      await setLater(table, columns, id, content.get(table) ?? []);
  });
  return id;
}

async function copyRows(table: string, shopId: string, found: object[]): Promise<void> {
  const columns = (await columnsOf(table)).join(', ');
  for (let from = 0; from < found.length; from += 1000) {
    const copies = found.slice(from, from + 1000).map((each) => ({
      ...(each as { row: object }).row,
      shop_id: shopId,
      ...Object.fromEntries((later[table] ?? []).map((column) => [column, null])),
    }));
    await write(
      // Numbers that count themselves are copied too: they order a visit's acts.
      `insert into ${table} (${columns}) overriding system value
       select ${columns} from jsonb_populate_recordset(null::${table}, $copies::jsonb)`,
      { copies: JSON.stringify(copies) },
    );
  }
}

async function setLater(
  table: string,
  columns: string[],
  shopId: string,
  found: object[],
): Promise<void> {
  const links = found.map((each) => (each as { row: object }).row);
  await write(
    `update ${table} t set ${columns.map((c) => `${c} = l.${c}`).join(', ')}
     from jsonb_populate_recordset(null::${table}, $links::jsonb) l where t.shop_id = $shopId and t.id = l.id`,
    { shopId, links: JSON.stringify(links) },
  );
}

/** Columns one may write: generated ones make themselves. */
async function columnsOf(table: string): Promise<string[]> {
  const found = await rows<{ name: string }>(
    `select attname as name from pg_attribute
     where attrelid = $table::regclass and attnum > 0 and not attisdropped and attgenerated = ''`,
    { table },
  );
  return found.map((column) => column.name);
}
