import { write } from '../../server/src/core/database/tenancy';
import { api } from '../support/api';
import { startTestServer, type TestServer } from '../support/app';
import { buildLaundry, buildPerson, buildShop, inShop, type TestShop } from '../support/factories';

describe('the books', () => {
  let server: TestServer;
  let shop: TestShop;
  let office: ReturnType<typeof api>;

  beforeAll(async () => {
    server = await startTestServer();
    shop = await buildShop();
    office = api(server.app, (await buildPerson(shop, 'office')).token);
  });
  afterAll(() => server.close());

  // A ticket and what the shop bore of it are two documents of one id: the journal, which is read in
  // pieces of 2,000 documents, must not lose the second where a piece ends.
  it('give out every document of a journal longer than one piece', async () => {
    const { clientId, storeId } = await buildLaundry(shop, 1);
    await inShop(shop, () =>
      write(
        `insert into entries (shop_id, id, document_kind, document_id, line_no, account, client_id,
           store_id, amount, posted_on)
         select $shopId, gen_random_uuid(), d.kind, d.id, l.no, l.account, $clientId, $storeId,
           l.amount, '2031-03-04'
         from (
           select 'payment' as kind, ('00000000-0000-7000-8000-' || lpad(n::text, 12, '0'))::uuid as id
           from generate_series(1, 1999) n
           union all
           select kind, 'ffffffff-0000-7000-8000-000000000001'::uuid
           from unnest(array['ticket', 'absorbed']) kind
         ) d cross join (values (0, 'bank', 100), (1, 'receivable', -100)) l (no, account, amount)`,
        { shopId: shop.id, clientId, storeId },
      ),
    );
    const { text } = await office.call('ledger.journal');
    const documents = text.split('\n').filter((line) => line.startsWith('2031-03-04'));
    expect(documents).toHaveLength(2001);
    expect(documents.filter((line) => line.endsWith(' absorbed'))).toHaveLength(1);
    expect(documents.filter((line) => line.endsWith(' ticket'))).toHaveLength(1);
  });
});
