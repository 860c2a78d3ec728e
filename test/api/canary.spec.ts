import { type Operation, type OperationId, operations } from '@lib/contracts';
import { type Response } from 'supertest';
import { v7 as uuid } from 'uuid';
import { z } from 'zod';
import { withClient } from '../../infra/postgres/databases';
import { platformRows, rows as tenantRows } from '../../server/src/core/database/tenancy';
import { signAccessToken } from '../../server/src/core/auth/access-token';
import { api, type Ask } from '../support/api';
import { sessionSecret, startTestServer, type TestServer } from '../support/app';
import { buildCanary, type Canary, canaryWord } from '../support/canary';
import {
  buildLaundry,
  buildPerson,
  buildShop,
  inShop,
  type TenantRole,
} from '../support/factories';
import { seeded } from '../support/random';
import { type JsonSchema, sample } from '../support/sample-schema';

// A row of a foreign shop must be indistinguishable from a row that is not there: each operation is
// called with the ids of a foreign shop's rows and with ids of nothing, and the answers compared.
let server: TestServer;
let canary: Canary;
const tokens = new Map<string, string>();
const roles: TenantRole[] = ['shop_owner', 'office', 'tech', 'client_owner', 'attendant'];
// These keep the answer open, end the caller's own session, or need a real mailed token.
const notById = new Set(['live.follow']);

beforeAll(async () => {
  server = await startTestServer();
  canary = await buildCanary();
  const shop = await buildShop();
  const laundry = await buildLaundry(shop);
  for (const role of roles) {
    const of = {
      ...(role === 'client_owner' || role === 'attendant' ? { clientId: laundry.clientId } : {}),
      ...(role === 'attendant' ? { storeId: laundry.storeId } : {}),
    };
    tokens.set(role, (await buildPerson(shop, role, of)).token);
  }
  const admin = { sub: uuid(), sid: uuid(), name: 'Admin' };
  await platformRows(
    `insert into users (id, email, name, platform_admin) values ($id, 'admin@people.example', 'Admin', true)`,
    { id: admin.sub },
  );
  tokens.set(
    'platform_admin',
    signAccessToken({ ...admin, role: 'platform_admin' }, sessionSecret).token,
  );
});

afterAll(() => server.close());

const schemaOf = (type: z.ZodType | undefined): JsonSchema | undefined =>
  type && (z.toJSONSchema(type, { io: 'input', unrepresentable: 'any' }) as JsonSchema);

/** Which tables a field of this name may point at: by its name, or any. */
function tablesFor(name: string): string[] {
  const stem = name
    .replace(/Ids?$/, '')
    .replace(/([A-Z])/g, '_$1')
    .toLowerCase();
  const guesses = [`${stem}s`, `${stem}es`, stem.replace(/y$/, 'ies')];
  const known = guesses.filter((table) => canary.ids.has(table));
  return known.length ? known : [...canary.ids.keys()];
}

function askFor(
  operation: Operation,
  id: (name: string) => string,
  seed: number,
  mark = 'one',
): Ask {
  const random = seeded(seed);
  const options = { random, id, mark, optional: 1 };
  const params = schemaOf(operation.params);
  const query = schemaOf(operation.query);
  const body = schemaOf(operation.body);
  const asked = query
    ? (sample(query, { ...options, optional: 0.5 }) as Record<string, unknown>)
    : {};
  delete asked.cursor;
  return {
    params: params ? (sample(params, options) as Record<string, string>) : {},
    query: asked,
    ...(body ? { body: sample(body, options) } : {}),
    ...(operation.ifMatch ? { version: 1 } : {}),
    key: uuid(),
  };
}

/** What a caller learns of an answer, without what differs between any two requests. */
function told(answer: Response, ids: string[]): string {
  let text = answer.text ?? '';
  for (const id of ids) text = text.replaceAll(id, '<id>');
  return `${answer.status} ${text
    .replace(/"requestId":"[^"]*"/g, '')
    .replaceAll(/one"|two"/g, '<mark>"')
    .replace(/[0-9a-f]{8}-[0-9a-f]{4}-7[0-9a-f]{3}-[0-9a-f]{4}-[0-9a-f]{12}/g, '<made id>')
    .replace(/\d{4}-\d\d-\d\dT[\d:.]+Z/g, '<time>')}`;
}

function usesIds(operation: Operation): boolean {
  return JSON.stringify([
    schemaOf(operation.params),
    schemaOf(operation.query),
    schemaOf(operation.body),
  ]).includes('"uuid"');
}

const byId = (Object.values(operations) as Operation[]).filter(
  (o) => usesIds(o) && !notById.has(o.id),
);

describe('a foreign shop', () => {
  it('has a row in every tenant table', async () => {
    let tables: string[] = [];
    await withClient(server.ownerUrl, async (client) => {
      const { rows } = await client.query<{ name: string }>(
        `select c.relname as name from pg_class c join pg_attribute a on a.attrelid = c.oid
         where a.attname = 'shop_id' and c.relkind = 'r' and c.relnamespace = 'public'::regnamespace
           and c.relname not in ('sessions', 'platform_mails')`,
      );
      tables = rows.map((r) => r.name);
    });
    const without: string[] = [];
    for (const table of tables) {
      const found = await inShop(canary.shop, () =>
        tenantRows(`select 1 from ${table} where shop_id = $shopId limit 1`, {
          shopId: canary.shop.id,
        }),
      );
      if (found.length === 0) without.push(table);
    }
    expect(without).toEqual([]);
  });

  it.each(byId.map((o) => [o.id, o] as const))(
    '%s answers its rows like absent ones',
    async (id, operation) => {
      const absent = seeded(7);
      for (const [role, token] of tokens) {
        const caller = api(server.app, token);
        for (let variant = 0; variant < 3; variant++) {
          const canaryId = (name: string): string => {
            const tables = tablesFor(name);
            return canary.ids.get(tables[variant % tables.length] as string) as string;
          };
          // Where one foreign id stands twice, one absent id does: only that differs.
          const standIns = new Map<string, string>();
          const absentId = (name: string): string => {
            const id = standIns.get(canaryId(name)) ?? absent.uuid();
            standIns.set(canaryId(name), id);
            return id;
          };
          const foreign = askFor(operation, canaryId, variant);
          const nothing = askFor(operation, absentId, variant, 'two');
          const [one, other] = [
            await caller.call(id as OperationId, foreign),
            await caller.call(id as OperationId, nothing),
          ];
          const mentioned = [
            ...canary.ids.values(),
            ...(JSON.stringify(nothing).match(/[0-9a-f-]{36}/g) ?? []),
          ];
          expect([role, told(one, mentioned)]).toEqual([role, told(other, mentioned)]);
          expect(one.status).not.toBe(500);
          if (role !== 'platform_admin') expect(one.text ?? '').not.toContain(canaryWord);
        }
      }
    },
  );

  it.each(
    (Object.values(operations) as Operation[])
      .filter((o) => o.method === 'GET' && !notById.has(o.id))
      .map((o) => [o.id, o] as const),
  )('%s never tells of it', async (id, operation) => {
    for (const [role, token] of tokens) {
      if (role === 'platform_admin') continue;
      const answer = await api(server.app, token).call(
        id as OperationId,
        askFor(operation, () => seeded(9).uuid(), 3),
      );
      expect([role, (answer.text ?? '').includes(canaryWord)]).toEqual([role, false]);
    }
  });
});
