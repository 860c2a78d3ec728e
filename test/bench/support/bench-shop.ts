import { v7 as uuid } from 'uuid';
import { withClient } from '../../../infra/postgres/databases';

export interface BenchShop {
  id: string;
  ownerMembershipId: string;
  ownerUserId: string;
  stores: number;
}

/**
 * A shop with many stores, each with two signed-off tickets of two lines in `month` and one contact
 * who gets statements: written by plain SQL as a superuser, because only what follows is measured.
 */
export async function buildBenchShop(
  superuserUrl: string,
  stores: number,
  month: string,
): Promise<BenchShop> {
  const shop = { id: uuid(), ownerMembershipId: uuid(), ownerUserId: uuid(), stores };
  const [client, edition] = [uuid(), uuid()];
  const of = (values: Record<string, string>, sql: string) =>
    sql.replaceAll(/:(\w+)/g, (all, name: string) => (name in values ? `'${values[name]}'` : all));
  const values = {
    shop: shop.id,
    client,
    edition,
    month,
    membership: shop.ownerMembershipId,
    user: shop.ownerUserId,
    day: `${month}-15`,
  };
  const run = (sql: string) => of(values, sql);
  await withClient(superuserUrl, async (db) => {
    await db.query(
      run(`
      insert into shops (id, name, zone, currency) values (:shop, 'Bench shop', 'America/Chicago', 'USD');
      insert into subscriptions (shop_id, id, plan_id, state, state_since)
        select :shop, gen_random_uuid(), id, 'active', now() from plans where code = 'depot';
      insert into users (id, email, name) values (:user, 'owner-' || :user || '@bench.example', 'Bench Owner');
      insert into memberships (shop_id, id, user_id, role, name, email)
        values (:shop, :membership, :user, 'shop_owner', 'Bench Owner', 'owner@bench.example');
      insert into shop_settings (shop_id, id, close_by_schedule, set_up_at) values (:shop, gen_random_uuid(), false, now());
      insert into editions (shop_id, id, number, valid_from, book) values (:shop, :edition, 1, '2020-01-01', '{}');
      insert into clients (shop_id, id, name, number) values (:shop, :client, 'Bench client', 'C-1');
      insert into stores (shop_id, id, client_id, name, number, address)
        select :shop, gen_random_uuid(), :client, 'Store ' || n, 'S-' || lpad(n::text, 5, '0'), n || ' Bench Road'
        from generate_series(1, ${stores}) n;
      insert into contacts (shop_id, id, client_id, store_id, name, email, gets_statements)
        select :shop, gen_random_uuid(), :client, id, 'Owner of ' || name, lower(number) || '@bench.example', true
        from stores where shop_id = :shop;
      insert into banks (shop_id, id, client_id, store_id, letter)
        select :shop, gen_random_uuid(), :client, id, 'A' from stores where shop_id = :shop;
      insert into machines (shop_id, id, client_id, store_id, bank_id, bay, bay_number, kind, sticker_code)
        select :shop, gen_random_uuid(), :client, b.store_id, b.id, 'A-0' || n, n, 'top_loader', 'B' || b.id || n
        from banks b, generate_series(1, 2) n where b.shop_id = :shop;
      insert into visits (shop_id, id, client_id, store_id, number, planned_on, state)
        select :shop, gen_random_uuid(), :client, s.id, (row_number() over (order by s.id, n)), :day, 'completed'
        from stores s, generate_series(1, 2) n where s.shop_id = :shop;
      insert into jobs (shop_id, id, client_id, store_id, visit_id, machine_id, position, finding, action, result)
        select :shop, gen_random_uuid(), :client, v.store_id, v.id, m.id, m.bay_number,
          'Inlet valve blocked with grit', 'Valve fitted, fill timed', 'put_right'
        from visits v join machines m on m.shop_id = v.shop_id and m.store_id = v.store_id where v.shop_id = :shop;
      insert into tickets (shop_id, id, client_id, store_id, visit_id, number, signed_off_on, edition_id, currency,
          list, net, tax, total, borne_by_shop, own_cost)
        select :shop, gen_random_uuid(), :client, store_id, id, number, :day, :edition, 'USD', 14000, 14000, 700, 14700, 0, 0
        from visits where shop_id = :shop;
      update visits v set ticket_id = t.id from tickets t where t.shop_id = v.shop_id and t.visit_id = v.id and v.shop_id = :shop;
      insert into ticket_lines (shop_id, id, client_id, ticket_id, job_id, position, line_key, kind, description,
          quantity_milli, unit_price, bearer, list, charged, tax_basis_points, tax, cost)
        select :shop, gen_random_uuid(), :client, t.id, j.id, j.position, 'job:' || j.id, 'labour', 'Labour',
          1000, 7000, 'store', 7000, 7000, 500, 350, 2000
        from tickets t join jobs j on j.shop_id = t.shop_id and j.visit_id = t.visit_id where t.shop_id = :shop;
      insert into entries (shop_id, id, document_kind, document_id, line_no, account, client_id, store_id, amount, posted_on)
        select :shop, gen_random_uuid(), 'ticket', t.id, l.no, l.account, :client, t.store_id, l.amount, :day
        from tickets t, (values (1, 'unbilled', 14700), (2, 'revenue_labour', -14000), (3, 'tax_payable', -700)) l (no, account, amount)
        where t.shop_id = :shop;
      insert into counters (shop_id, kind, value) values (:shop, 'ticket', ${stores * 2}), (:shop, 'visit', ${stores * 2});
      `),
    );
    await db.query('analyze');
  });
  return shop;
}
