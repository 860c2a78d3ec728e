import { createServer, type Server } from 'node:http';
import { type AddressInfo } from 'node:net';
import { setTimeout as wait } from 'node:timers/promises';
import { listenForChanges } from '../../server/src/core/live/live';
import { api } from '../support/api';
import { startTestServer, type TestServer } from '../support/app';
import {
  buildClient,
  buildLaundry,
  buildPerson,
  buildShop,
  type TestPerson,
  type TestShop,
} from '../support/factories';

/** What an open browser window hears: the text of the stream so far. */
interface Listener {
  heard(): string;
  stop(): void;
}

describe('what changes in the shop', () => {
  let server: TestServer;
  let http: Server;
  let live: { close(): Promise<void> };
  let shop: TestShop;
  const listeners: Listener[] = [];

  beforeAll(async () => {
    server = await startTestServer();
    live = listenForChanges(server.config.database.directUrl, server.log);
    http = createServer(server.app).listen(0, '127.0.0.1');
    shop = await buildShop();
  });
  afterAll(async () => {
    listeners.forEach((listener) => listener.stop());
    http.closeAllConnections();
    http.close();
    await live.close();
    await server.close();
  });

  async function follow(person: TestPerson): Promise<Listener> {
    const stop = new AbortController();
    const { port } = http.address() as AddressInfo;
    const answer = await fetch(`http://127.0.0.1:${port}/api/live`, {
      headers: { authorization: `Bearer ${person.token}` },
      signal: stop.signal,
    });
    expect(answer.status).toBe(200);
    expect(answer.headers.get('content-type')).toContain('text/event-stream');
    let text = '';
    const reader = (answer.body as ReadableStream<Uint8Array>).getReader();
    void (async () => {
      for (;;) {
        const { value, done } = await reader.read();
        if (done) return;
        text += Buffer.from(value).toString();
      }
    })().catch(() => undefined);
    const listener = { heard: () => text, stop: () => stop.abort() };
    listeners.push(listener);
    return listener;
  }

  async function until(holds: () => boolean): Promise<void> {
    for (let i = 0; i < 100 && !holds(); i++) await wait(50);
    expect(holds()).toBe(true);
  }

  it('reaches those who follow it, by ids alone, and nobody of another shop or client', async () => {
    const person = await buildPerson(shop, 'office');
    const office = api(server.app, person.token);
    const mine = await buildClient(shop, { name: 'Secret Suds' });
    const other = await buildClient(shop);
    const inShop = await follow(person);
    const ofClient = await follow(await buildPerson(shop, 'client_owner', { clientId: mine }));
    const ofOther = await follow(await buildPerson(shop, 'client_owner', { clientId: other }));
    const elsewhere = await follow(await buildPerson(await buildShop(), 'office'));
    await until(() => inShop.heard().includes('following'));
    // The connection that listens may still be opening: a change is made until it is heard.
    for (let version = 1; version < 20 && !inShop.heard().includes(mine); version++) {
      await office.call('clients.change', {
        params: { clientId: mine },
        version,
        body: { note: String(version) },
      });
      await wait(100);
    }
    const event = `event: clients\ndata: {"kind":"clients","id":"${mine}"}\n\n`;
    await until(() => inShop.heard().includes(event) && ofClient.heard().includes(event));
    expect(inShop.heard()).not.toContain('Secret');
    expect(ofOther.heard()).not.toContain(mine);
    expect(elsewhere.heard()).not.toContain(mine);
  });

  it('reaches an attendant without the ids of their client’s other stores', async () => {
    const person = await buildPerson(shop, 'office');
    const { clientId, storeId } = await buildLaundry(shop);
    const attendant = await follow(await buildPerson(shop, 'attendant', { clientId, storeId }));
    await until(() => attendant.heard().includes('following'));
    const other = await api(server.app, person.token).call('stores.create', {
      body: { clientId, name: 'Other Street', address: '1 Other Street' },
    });
    expect(other.status).toBe(201);
    await until(() => attendant.heard().includes('event: stores\n'));
    expect(attendant.heard()).toContain('data: {"kind":"stores","id":null}');
    expect(attendant.heard()).not.toContain((other.body as { id: string }).id);
  });

  it('is told when it is done, not when it fails', async () => {
    const person = await buildPerson(shop, 'office');
    const office = api(server.app, person.token);
    const clientId = await buildClient(shop);
    const heard = await follow(person);
    await until(() => heard.heard().includes('following'));
    const stale = { params: { clientId }, version: 99, body: { note: 'x' } };
    expect((await office.call('clients.change', stale)).status).toBe(412);
    const done = await office.call('clients.change', { ...stale, version: 1 });
    expect(done.status).toBe(200);
    await until(() => heard.heard().includes(clientId));
    expect(heard.heard().split(clientId)).toHaveLength(2);
  });

  it('includes invitations: sent, mailed again, taken back', async () => {
    const owner = await buildPerson(shop, 'shop_owner');
    const heard = await follow(owner);
    await until(() => heard.heard().includes('following'));
    const desk = api(server.app, owner.token);
    const body = { email: 'new-tech@people.example', name: 'Nia New', role: 'tech' };
    const { id } = (await desk.call('invitations.send', { body })).body as { id: string };
    const times = () => heard.heard().split(`"kind":"invitations","id":"${id}"`).length - 1;
    await until(() => times() === 1);
    const params = { invitationId: id };
    expect((await desk.call('invitations.resend', { params })).status).toBe(200);
    await until(() => times() === 2);
    expect((await desk.call('invitations.withdraw', { params })).status).toBe(200);
    await until(() => times() === 3);
  });

  it('is for people who are signed in', async () => {
    expect((await api(server.app).call('live.follow')).status).toBe(401);
  });
});
