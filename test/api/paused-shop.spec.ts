import { type Operation, type OperationId, operations, permissionsOf } from '@lib/contracts';
import { z } from 'zod';
import { platformRows } from '../../server/src/core/database/tenancy';
import { api } from '../support/api';
import { startTestServer, type TestServer } from '../support/app';
import { buildLaundry, buildPerson, buildShop, type TestShop } from '../support/factories';
import { seeded } from '../support/random';
import { type JsonSchema, sample } from '../support/sample-schema';

// What may be written though the shop is paused: paying, and letting support in or keeping it out.
const open = ['subscription.choose', 'subscription.check', 'consents.give', 'consents.withdraw'];

const schemaOf = (type: z.ZodType | undefined): JsonSchema | undefined =>
  type && (z.toJSONSchema(type, { io: 'input', unrepresentable: 'any' }) as JsonSchema);

describe.each(['paused', 'canceled'] as const)('a %s shop', (state) => {
  let server: TestServer;
  let shop: TestShop;
  let owner: ReturnType<typeof api>;

  beforeAll(async () => {
    server = await startTestServer();
    shop = await buildShop();
    await buildLaundry(shop);
    owner = api(server.app, (await buildPerson(shop, 'shop_owner')).token);
    await platformRows('update subscriptions set state = $state where shop_id = $shop', {
      state,
      shop: shop.id,
    });
  });
  afterAll(() => server.close());

  const own = (Object.values(operations) as Operation[]).filter((o) =>
    (permissionsOf('shop_owner') as string[]).includes(o.permission),
  );
  const ask = (operation: Operation) => {
    const random = seeded(5);
    const options = { random, id: () => random.uuid(), optional: 0.3 };
    const params = schemaOf(operation.params);
    const body = schemaOf(operation.body);
    return {
      ...(params ? { params: sample(params, options) as Record<string, string> } : {}),
      ...(body ? { body: sample(body, options) } : {}),
      ...(operation.ifMatch ? { version: 1 } : {}),
      ...(operation.bodyType === 'multipart/form-data'
        ? { file: { name: 'a.csv', content: Buffer.from('a') }, body: undefined }
        : {}),
    };
  };

  const refusedAsPaused: string[] = [];
  const writes = own.filter((o) => o.method !== 'GET' && !o.whilePaused);
  it.each(writes.map((o) => [o.id, o] as const))('refuses %s', async (id, operation) => {
    const answer = await owner.call(id as OperationId, ask(operation));
    // Unless the request itself is refused first, being made up.
    expect([403, 422, 400]).toContain(answer.status);
    if (answer.status !== 403) return;
    expect(answer.body.type).toBe('/problems/shop-paused');
    refusedAsPaused.push(id);
  });

  it('was asked well enough that nearly all were refused for being paused', () => {
    expect(refusedAsPaused.length).toBeGreaterThan(writes.length * 0.8);
  });

  const lists = own.filter((o) => o.method === 'GET' && !o.params && !o.answerType);
  it.each(lists.map((o) => [o.id, o] as const))('still answers %s', async (id) => {
    const answer = await owner.call(id as OperationId);
    expect(answer.body.type).not.toBe('/problems/shop-paused');
    expect(answer.status).not.toBe(403);
  });

  it('can still be paid for, and lets support in', () => {
    const stays = own.filter((o) => o.method !== 'GET' && o.whilePaused).map((o) => o.id);
    expect(stays).toEqual(expect.arrayContaining(open));
  });

  it('writes nothing at all when it tries', async () => {
    const before = await owner.call('clients.list');
    await owner.call('clients.create', { body: { name: 'Sneaked In' } });
    expect((await owner.call('clients.list')).body).toEqual(before.body);
  });
});
