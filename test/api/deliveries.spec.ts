import { type Mailbox } from '../../infra/fakes/mailbox/mailbox';
import { systemContext } from '../../server/src/core/context';
import { rows } from '../../server/src/core/database/tenancy';
import { mostAttempts } from '../../server/src/core/mail/settle';
import { sweepDeliveries } from '../../server/src/features/deliveries/sweep-deliveries';
import { api } from '../support/api';
import { type TestServer } from '../support/app';
import {
  buildPerson,
  buildShop,
  inShop,
  type TestPerson,
  type TestShop,
} from '../support/factories';
import {
  buildPayingStore,
  buildSignedOff,
  closedMonths,
  type MoneyStore,
  workClose,
} from '../support/money';
import { setUpMailServer } from '../support/set-ups';

const { last } = closedMonths();

interface Delivery {
  id: string;
  state: string;
  attempt: number;
  lastError: string | null;
  version: number;
}

describe('deliveries', () => {
  let server: TestServer;
  let mailbox: Mailbox;
  let shop: TestShop;
  let office: TestPerson;
  let store: MoneyStore;
  setUpMailServer((made) => ({ server, mailbox } = made));
  beforeEach(async () => {
    mailbox.setMode('normal');
    shop = await buildShop();
    office = await buildPerson(shop, 'office');
    store = await buildPayingStore(shop);
    await buildSignedOff(shop, store, { on: `${last}-05`, net: 20_000 });
    await asOffice().call('statements.close', { body: { month: last } });
  });
  const asOffice = () => api(server.app, office.token);
  const context = () => systemContext(shop.id, new Date());
  const letters = () => mailbox.letters.list({ to: store.email });
  const delivery = async () => (await asOffice().call('deliveries.list')).body.items[0] as Delivery;
  const run = async () => {
    const { body } = await asOffice().call('statements.runs');
    return (
      await asOffice().call('statements.run', { params: { runId: body.items[0].id as string } })
    ).body;
  };
  const set = (values: string) =>
    inShop(shop, () =>
      rows(`update deliveries set ${values} where shop_id = $shopId`, { shopId: shop.id }),
    );

  async function decide(decision: 'arrived' | 'send_again') {
    const { id, version } = await delivery();
    return asOffice().call('deliveries.decide', {
      params: { deliveryId: id },
      version,
      body: { decision },
    });
  }

  it('is uncertain when the answer was lost, and is never sent again by itself', async () => {
    mailbox.setMode('drop-after-data', 1, store.email);
    await workClose(server);
    expect(await delivery()).toMatchObject({ state: 'uncertain', attempt: 1 });
    expect(await run()).toMatchObject({ state: 'done', mails: { uncertain: 1, sent: 0 } });
    await sweepDeliveries(context());
    await workClose(server);
    expect(letters()).toHaveLength(1);
    expect((await decide('arrived')).body).toMatchObject({ state: 'sent', lastError: null });
    await workClose(server);
    expect(letters()).toHaveLength(1);
    expect((await decide('send_again')).status).toBe(409);
  });

  it('is sent again by the word of a person, under the same Message-ID', async () => {
    mailbox.setMode('drop-after-data', 1, store.email);
    await workClose(server);
    expect((await decide('send_again')).body).toMatchObject({ state: 'waiting' });
    expect((await run()).state).toBe('sending');
    await workClose(server);
    expect(await delivery()).toMatchObject({ state: 'sent', attempt: 2 });
    expect((await run()).state).toBe('done');
    expect(new Set(letters().map((letter) => letter.messageId)).size).toBe(1);
    expect(letters()).toHaveLength(2);
  });

  it('waits after a passing refusal and is tried again', async () => {
    mailbox.setMode('reject-4xx', 1, store.email);
    await workClose(server);
    expect(await delivery()).toMatchObject({
      state: 'waiting',
      attempt: 1,
      lastError: expect.stringContaining('451'),
    });
    expect((await run()).state).toBe('sending');
    await sweepDeliveries(context());
    await workClose(server);
    expect(letters()).toHaveLength(0);
    await set('next_attempt_at = now()');
    await sweepDeliveries(context());
    await workClose(server);
    expect(await delivery()).toMatchObject({ state: 'sent', attempt: 2, lastError: null });
    expect(letters()).toHaveLength(1);
  });

  it('fails visibly after a final refusal, or when tried too often', async () => {
    mailbox.setMode('reject-5xx', 1, store.email);
    await workClose(server);
    expect(await delivery()).toMatchObject({
      state: 'failed',
      lastError: expect.stringContaining('550'),
    });
    expect(await run()).toMatchObject({ state: 'done', mails: { failed: 1 } });
    await decide('send_again');
    mailbox.setMode('reject-4xx', 1, store.email);
    await set(`attempt = ${mostAttempts - 1}`);
    await workClose(server);
    expect(await delivery()).toMatchObject({ state: 'failed', attempt: mostAttempts });
    expect(letters()).toHaveLength(0);
  });

  it('is tried again when no mail server answers at all', async () => {
    const silent = { ...server.config.mail };
    server.config.mail.smtpUrl = 'smtp://127.0.0.1:1';
    await workClose(server);
    server.config.mail.smtpUrl = silent.smtpUrl;
    expect(await delivery()).toMatchObject({ state: 'waiting', attempt: 1 });
    await set('next_attempt_at = now()');
    await sweepDeliveries(context());
    await workClose(server);
    expect(letters()).toHaveLength(1);
  });

  it('becomes uncertain when the process ended in the middle, once its lease is over', async () => {
    mailbox.setMode('reject-4xx', 1, store.email);
    await workClose(server);
    // As a killed worker leaves it: being handed over, by an attempt nobody will finish.
    await set(`state = 'handing_over', attempt = 7, lease_until = now() + interval '5 minutes'`);
    await sweepDeliveries(context());
    expect(await delivery()).toMatchObject({ state: 'handing_over' });
    await set(`lease_until = now() - interval '1 second'`);
    await sweepDeliveries(context());
    expect(await delivery()).toMatchObject({ state: 'uncertain', attempt: 7 });
    await workClose(server);
    expect(letters()).toHaveLength(0);
  });

  it('is the office’s to decide, on the version it saw', async () => {
    mailbox.setMode('reject-5xx', 1, store.email);
    await workClose(server);
    const { id, version } = await delivery();
    const stale = await asOffice().call('deliveries.decide', {
      params: { deliveryId: id },
      version: version + 1,
      body: { decision: 'send_again' },
    });
    expect(stale.status).toBe(412);
    const client = await buildPerson(shop, 'client_owner', { clientId: store.clientId });
    const asClient = api(server.app, client.token);
    expect((await asClient.call('deliveries.list')).status).toBe(403);
  });
});
