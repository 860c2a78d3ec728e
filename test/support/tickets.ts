import { v7 as uuid } from 'uuid';
import { firstBook } from '../../server/src/features/prices/first-book';
import { buildLaundry, insert, next, type TestShop } from './factories';

/** A visit as a row, for tests that only need one to be there. */
export function buildVisitRow(
  shop: TestShop,
  values: Record<string, unknown> & { client_id: string; store_id: string },
): Promise<string> {
  return insert(shop, 'visits', { number: next(), planned_on: '2031-05-06', ...values });
}

/** A signed-off ticket as a row, with the laundry, visit and edition it needs. */
export async function buildTicket(shop: TestShop): Promise<string> {
  const { clientId: client_id, storeId: store_id } = await buildLaundry(shop, 1);
  const of = { client_id, store_id };
  const visit_id = await buildVisitRow(shop, { ...of, state: 'completed' });
  const edition_id = await insert(shop, 'editions', {
    number: 10_000 + next(),
    valid_from: '2000-01-01',
    book: JSON.stringify(firstBook('USD')),
  });
  return insert(shop, 'tickets', {
    ...of,
    id: uuid(),
    visit_id,
    number: next(),
    signed_off_on: '2031-05-06',
    edition_id,
    currency: 'USD',
    list: 100,
    net: 100,
    tax: 0,
    total: 100,
    borne_by_shop: 0,
    own_cost: 0,
  });
}
