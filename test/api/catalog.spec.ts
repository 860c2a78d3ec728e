import { withClient } from '../../infra/postgres/databases';
import { testDatabase } from '../support/postgres';

/** Rows of the catalog as the schema's owner sees them. */
async function catalog<T extends object>(sql: string): Promise<T[]> {
  const { ownerUrl } = await testDatabase();
  let found: T[] = [];
  await withClient(ownerUrl, async (client) => {
    found = (await client.query<T>(sql)).rows;
  });
  return found;
}

// A tenant table is any with a shop_id that is not the platform's own record of a shop.
const platformTables = ['sessions', 'platform_mails'];
const tenantTables = `
  select c.oid, c.relname as name, c.relrowsecurity, c.relforcerowsecurity
  from pg_class c join pg_namespace n on n.oid = c.relnamespace
  join pg_attribute a on a.attrelid = c.oid and a.attname = 'shop_id' and not a.attisdropped
  where n.nspname = 'public' and c.relkind = 'r'
    and c.relname not in (${platformTables.map((t) => `'${t}'`).join(', ')})`;

const appendOnly = [
  'acts',
  'allocations',
  'audit',
  'editions',
  'entries',
  'fees',
  'platform_audit',
  'refunds',
  'rulings',
  'statement_documents',
  'statements',
  'subscription_events',
  'ticket_lines',
  'tickets',
];

describe('the schema keeps tenants apart', () => {
  it('has tenant tables to check', async () => {
    expect((await catalog(tenantTables)).length).toBeGreaterThan(35);
  });

  it('leads every primary and unique key of a tenant table with shop_id', async () => {
    const wrong = await catalog<{ index: string }>(`
      select i.indexrelid::regclass::text as index from (${tenantTables}) t
      join pg_index i on i.indrelid = t.oid
      left join pg_attribute a on a.attrelid = t.oid and a.attnum = i.indkey[0]
      where i.indisunique and coalesce(a.attname, '') <> 'shop_id'
        and i.indexrelid::regclass::text not in
          ('invitations_token_hash_key', 'subscriptions_card_subscription_key')`);
    expect(wrong).toEqual([]);
  });

  it('leads every other index of a tenant table with shop_id, but for those sign-in looks up by', async () => {
    const wrong = await catalog<{ index: string }>(`
      select i.indexrelid::regclass::text as index from (${tenantTables}) t
      join pg_index i on i.indrelid = t.oid
      left join pg_attribute a on a.attrelid = t.oid and a.attnum = i.indkey[0]
      where not i.indisunique and coalesce(a.attname, '') <> 'shop_id'
        and i.indexrelid::regclass::text not in ('memberships_of_user', 'subscriptions_by_state')`);
    expect(wrong).toEqual([]);
  });

  it('points from tenant table to tenant table by shop_id first', async () => {
    const wrong = await catalog<{ name: string }>(`
      select con.conrelid::regclass || ' ' || con.conname as name
      from pg_constraint con
      join (${tenantTables}) source on source.oid = con.conrelid
      join (${tenantTables}) target on target.oid = con.confrelid
      join pg_attribute a on a.attrelid = con.conrelid and a.attnum = con.conkey[1]
      join pg_attribute b on b.attrelid = con.confrelid and b.attnum = con.confkey[1]
      where con.contype = 'f' and not (a.attname = 'shop_id' and b.attname = 'shop_id')`);
    expect(wrong).toEqual([]);
  });

  it('forces row-level security on every tenant table, with a policy for the working role', async () => {
    const wrong = await catalog<{ name: string }>(`
      select t.name from (${tenantTables}) t
      where not t.relrowsecurity or not t.relforcerowsecurity or not exists (
        select 1 from pg_policy p where p.polrelid = t.oid
          and 'tw_app'::regrole = any (p.polroles)
          and pg_get_expr(p.polqual, p.polrelid) like '%app.shop()%')`);
    expect(wrong).toEqual([]);
  });

  it('uses no volatile function in a policy', async () => {
    const volatile = await catalog<{ proname: string }>(`
      select proname from pg_proc p join pg_namespace n on n.oid = p.pronamespace
      where n.nspname = 'app' and proname in ('shop', 'client') and provolatile = 'v'`);
    expect(volatile).toEqual([]);
  });

  it('gives neither working role ownership, superuser rights or a way around the policies', async () => {
    const roles = await catalog<{ rolname: string; rolsuper: boolean; rolbypassrls: boolean }>(
      `select rolname, rolsuper, rolbypassrls from pg_roles where rolname in ('tw_app', 'tw_platform')`,
    );
    expect(roles).toHaveLength(2);
    expect(roles.filter((r) => r.rolsuper || r.rolbypassrls)).toEqual([]);
    const owned = await catalog(`select relname from pg_class where relowner in
      ('tw_app'::regrole, 'tw_platform'::regrole) and relnamespace = 'public'::regnamespace`);
    expect(owned).toEqual([]);
  });

  it('grants the platform role nothing on business tables', async () => {
    const granted = await catalog<{ table_name: string }>(`
      select distinct table_name from information_schema.role_table_grants
      where grantee = 'tw_platform' and table_schema = 'public' order by 1`);
    expect(granted.map((g) => g.table_name)).toEqual([
      'consents',
      'invitations',
      'mailed_tokens',
      'memberships',
      'plans',
      'platform_audit',
      'platform_mails',
      'recovery_codes',
      'refresh_tokens',
      'sessions',
      'shop_usage',
      'shops',
      'sign_in_failures',
      'sign_ups',
      'stripe_events',
      'subscription_events',
      'subscriptions',
      'users',
    ]);
  });

  it('keeps people quarrel over append-only, by grant and by trigger', async () => {
    const changeable = await catalog<{ table_name: string }>(`
      select distinct table_name from information_schema.role_table_grants
      where grantee in ('tw_app', 'tw_platform') and table_schema = 'public'
        and privilege_type in ('UPDATE', 'DELETE', 'TRUNCATE')
        and table_name in (${appendOnly.map((t) => `'${t}'`).join(', ')})`);
    expect(changeable).toEqual([]);
    const guarded = await catalog<{ name: string }>(`
      select distinct tgrelid::regclass::text as name from pg_trigger
      where tgname = 'append_only' order by 1`);
    expect(guarded.map((g) => g.name)).toEqual(appendOnly);
  });

  it('refuses a change of an append-only table even to its owner', async () => {
    const { ownerUrl } = await testDatabase();
    await withClient(ownerUrl, async (client) => {
      await expect(client.query('truncate platform_audit')).rejects.toThrow(/append-only/);
    });
  });
});
