import { v7 as uuid } from 'uuid';
import { systemContext } from '../core/context';
import { platformRow, platformRows, rows, withTenant, write } from '../core/database/tenancy';
import { brackwater } from './world';

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

/** Copies the larger shop of the demo until there are `wanted` shops. */
export async function growTo(wanted: number): Promise<void> {
  const model = await platformRow<{ id: string; name: string }>(
    'select id, name from shops order by name = $name desc, created_at, id limit 1',
    { name: brackwater.name },
  );
  const there = await platformRow<{ n: number }>('select count(*)::int as n from shops');
  if (!model || !there) throw new Error('There is no shop to copy: fill the demo first.');
  for (let n = there.n + 1; n <= wanted; n++) await copyShop(model, n);
}

/**
 * Most ids may stay the same, because every key starts with the shop. People may not: they sign in
 * before anybody knows for which shop, so each copy has its own, at an address of its own.
 */
async function copyShop(model: { id: string; name: string }, number: number): Promise<void> {
  const id = uuid();
  await platformRows(
    `insert into shops (id, name, zone, currency, locale)
     select $id, $name, zone, currency, locale from shops where id = $modelId`,
    { id, name: `${model.name} ${number}`, modelId: model.id },
  );
  await platformRows(
    `insert into subscriptions (shop_id, id, plan_id, state, state_since)
     select $id, $row, plan_id, state, state_since from subscriptions where shop_id = $modelId`,
    { id, row: uuid(), modelId: model.id },
  );
  const people = await copyPeople(model.id, number);
  const content = new Map<string, object[]>();
  await withTenant(systemContext(model.id, new Date()), async () => {
    for (const table of tables) {
      const found = await rows<{ row: object }>(
        `select to_jsonb(t) as row from ${table} t where shop_id = $modelId`,
        { modelId: model.id },
      );
      content.set(
        table,
        found.map(({ row }) => people.instead(row)),
      );
    }
  });
  await withTenant(systemContext(id, new Date()), async () => {
    for (const table of tables) await copyRows(table, id, content.get(table) ?? []);
    for (const [table, columns] of Object.entries(later))
      await setLater(table, columns, id, content.get(table) ?? []);
  });
}

interface PeopleOfCopy {
  /** A row of the model as it stands in the copy: with the copy's people, and their addresses. */
  instead<Row extends object>(row: Row): Row;
}

/** `odile.brandvold@works.example` of the model is `odile.brandvold@works3.example` of the third. */
async function copyPeople(modelId: string, number: number): Promise<PeopleOfCopy> {
  const elsewhere = (text: string) => text.replaceAll(/(@\w+)(\.example)/g, `$1${number}$2`);
  const found = await platformRows<{ user_id: string; id: string; email: string }>(
    'select user_id, id, email from memberships where shop_id = $modelId',
    { modelId },
  );
  const newIds = new Map<string, string>();
  for (const { user_id, id, email } of found) {
    newIds.set(id, uuid());
    if (newIds.has(user_id)) continue;
    const userId = uuid();
    newIds.set(user_id, userId);
    await platformRows(
      `insert into users (id, email, name, password_hash, email_verified_at)
       select $userId, $email, name, password_hash, email_verified_at from users where id = $model`,
      { userId, email: elsewhere(email), model: user_id },
    );
  }
  const instead = (text: string) =>
    elsewhere(text).replaceAll(/[0-9a-f]{8}(-[0-9a-f]{4}){3}-[0-9a-f]{12}/g, (id) => {
      return newIds.get(id) ?? id;
    });
  return {
    instead: <Row extends object>(row: Row) => JSON.parse(instead(JSON.stringify(row))) as Row,
  };
}

async function copyRows(table: string, shopId: string, found: object[]): Promise<void> {
  const columns = (await columnsOf(table)).join(', ');
  for (let from = 0; from < found.length; from += 1000) {
    const copies = found.slice(from, from + 1000).map((row) => ({
      ...row,
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
  await write(
    `update ${table} t set ${columns.map((c) => `${c} = l.${c}`).join(', ')}
     from jsonb_populate_recordset(null::${table}, $links::jsonb) l where t.shop_id = $shopId and t.id = l.id`,
    { shopId, links: JSON.stringify(found) },
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
