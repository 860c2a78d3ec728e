import { createServer, type Server } from 'node:http';
import { type AddressInfo } from 'node:net';
import { setTimeout as wait } from 'node:timers/promises';
import Stripe from 'stripe';
import { readBody } from '../http';
import { startStripeFake, type StripeFake } from './stripe-fake';

const secret = 'whsec_of_the_spec';
let received: { type: string; account?: string; valid: boolean }[];
let failNext: number;
let receiver: Server;
let fake: StripeFake;
let stripe: Stripe;

beforeEach(async () => {
  received = [];
  failNext = 0;
  receiver = createServer((request, response) => {
    void readBody(request).then((body) => {
      if (failNext > 0) {
        failNext -= 1;
        response.writeHead(500).end();
        return;
      }
      const signature = String(request.headers['stripe-signature']);
      let valid = true;
      try {
        stripe.webhooks.constructEvent(body, signature, secret);
      } catch {
        valid = false;
      }
      const event = JSON.parse(body) as { type: string; account?: string };
      received.push({ type: event.type, account: event.account, valid });
      response.writeHead(valid ? 200 : 400).end();
    });
  }).listen(0, '127.0.0.1');
  await new Promise((resolve) => receiver.once('listening', resolve));
  const { port } = receiver.address() as AddressInfo;
  fake = await startStripeFake({
    webhookUrl: `http://127.0.0.1:${port}/hook`,
    webhookSecret: secret,
  });
  stripe = new Stripe('sk_test_fake', { host: '127.0.0.1', port: fake.port, protocol: 'http' });
});

afterEach(async () => {
  await fake.close();
  receiver.closeAllConnections();
  await new Promise((resolve) => receiver.close(resolve));
});

async function until(test: () => boolean): Promise<void> {
  for (let tries = 0; !test() && tries < 200; tries += 1) await wait(25);
}

async function twoEvents(): Promise<string> {
  const { id } = await stripe.accounts.create({ country: 'US' });
  const wanted = { amount: 500, currency: 'usd' };
  const intent = await stripe.paymentIntents.create(wanted, { stripeAccount: id });
  await stripe.paymentIntents.cancel(intent.id, {}, { stripeAccount: id });
  return id;
}

const inOrder = ['payment_intent.created', 'payment_intent.canceled'];
const types = (): string[] => received.map((event) => event.type);

describe('webhooks', () => {
  it('are signed so that the SDK accepts them, and name the account', async () => {
    const account = await twoEvents();
    await until(() => received.length === 2);
    expect(received).toEqual(inOrder.map((type) => ({ type, account, valid: true })));
  });

  it('come again until they are answered with success', async () => {
    failNext = 2;
    await twoEvents();
    await until(() => received.length === 2);
    expect(types()).toEqual(inOrder);
  });

  it('are held, doubled, reversed and wrongly signed when told', async () => {
    const mode = async (name: string): Promise<void> => {
      const body = JSON.stringify({ mode: name });
      await fetch(`${fake.url}/fake/webhooks/mode`, { method: 'POST', body });
      received = [];
    };
    await mode('hold');
    await twoEvents();
    await wait(150);
    expect(received).toEqual([]);
    await fetch(`${fake.url}/fake/webhooks/flush`, { method: 'POST' });
    expect(types()).toEqual(inOrder);

    await mode('twice');
    await twoEvents();
    await until(() => received.length === 4);
    expect(types().sort()).toEqual([...inOrder, ...inOrder].sort());

    await mode('reversed');
    await twoEvents();
    await until(() => received.length === 2);
    expect(types()).toEqual([...inOrder].reverse());

    await mode('badsignature');
    await twoEvents();
    await until(() => received.length === 2);
    expect(received.map((event) => event.valid)).toEqual([false, false]);
  });
});
