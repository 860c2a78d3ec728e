import { once } from 'node:events';
import { type Server, Agent, request as httpRequest } from 'node:http';
import { type AddressInfo } from 'node:net';
import { type Operation, operations, storesAnswer } from '@lib/contracts';
import { z } from 'zod';
import { type StripeFake, startStripeFake } from '../../infra/fakes/stripe/stripe-fake';
import { startTestServer, type TestServer } from './app';
import { buildLaundry, buildPerson, buildShop } from './factories';
import { seeded, type Random } from './random';
import { type JsonSchema, sample } from './sample-schema';
import { brokenJson, spoil } from './spoil';

// Every operation of the API gets 1,000 requests that are nearly right. None may be answered with a
// server error, and every refusal must be a problem document (RFC 9457).
const bodiesEach = Number(process.env.FUZZ_BODIES ?? 1000);
const seed = Number(process.env.FUZZ_SEED ?? 20311);
const atOnce = 8;
// They answer with a stream that stays open.
const streams = new Set(['live.follow']);

let server: TestServer;
let stripe: StripeFake;
let listening: Server;
let port: number;
let knownIds: string[];
let tokens: Record<string, string>;
const agent = new Agent({ keepAlive: true, maxSockets: atOnce });

interface Sent {
  path: string;
  body: string | undefined;
  headers: Record<string, string>;
}

function send(
  operation: Operation,
  sent: Sent,
): Promise<{ status: number; type: string; text: string }> {
  return new Promise((resolve, reject) => {
    const outgoing = httpRequest(
      {
        host: '127.0.0.1',
        port,
        agent,
        method: operation.method,
        path: sent.path,
        headers: sent.headers,
      },
      (incoming) => {
        const chunks: Buffer[] = [];
        incoming.on('data', (chunk: Buffer) => chunks.push(chunk));
        incoming.on('end', () =>
          resolve({
            status: incoming.statusCode ?? 0,
            type: incoming.headers['content-type'] ?? '',
            text: Buffer.concat(chunks).toString('utf8'),
          }),
        );
        incoming.on('error', reject);
      },
    );
    outgoing.on('error', reject);
    outgoing.end(sent.body);
  });
}

function schemaOf(type: z.ZodType | undefined): JsonSchema | undefined {
  return type && (z.toJSONSchema(type, { io: 'input', unrepresentable: 'any' }) as JsonSchema);
}

function build(
  operation: Operation,
  schemas: Record<'params' | 'query' | 'body', JsonSchema | undefined>,
  random: Random,
): Sent {
  const options = {
    random,
    id: () => (random.chance(0.6) ? random.pick(knownIds) : random.uuid()),
  };
  const params = schemas.params ? (sample(schemas.params, options) as Record<string, unknown>) : {};
  if (random.chance(0.15)) {
    for (const name of Object.keys(params))
      params[name] = random.pick(['x', '%00', '-1', '%ff', 'a b']);
  }
  const path = operation.path.replaceAll(/:(\w+)/g, (_, name: string) =>
    encodeURI(String(params[name] ?? 'none'))
      .replaceAll('#', '')
      .replaceAll('?', ''),
  );
  const query = schemas.query ? spoil(sample(schemas.query, options), random) : {};
  const words = new URLSearchParams();
  for (const [name, value] of Object.entries((query ?? {}) as object))
    words.append(
      name,
      (typeof value === 'object' ? JSON.stringify(value) : String(value)).slice(0, 3000),
    );
  const headers: Record<string, string> = {};
  const token =
    operation.permission === 'public' ? undefined : tokens[random.chance(0.8) ? 'shop' : 'client'];
  if (token) headers.authorization = `Bearer ${token}`;
  if (operation.ifMatch && random.chance(0.9))
    headers['if-match'] = random.pick(['"1"', '"2"', '*', '"x"', '""']);
  if (storesAnswer(operation) && random.chance(0.95)) headers['idempotency-key'] = random.uuid();
  let body: string | undefined;
  if (schemas.body) {
    headers['content-type'] = random.chance(0.97)
      ? 'application/json'
      : random.pick(['text/plain', 'application/xml', 'x']);
    body = random.chance(0.05)
      ? brokenJson(random)
      : JSON.stringify(spoil(sample(schemas.body, options), random));
  }
  return { path: `${path}?${words.toString()}`.slice(0, 7000), body, headers };
}

async function open(): Promise<void> {
  stripe = await startStripeFake();
  server = await startTestServer({ STRIPE_API_BASE: stripe.url });
  listening = server.app.listen(0, '127.0.0.1');
  await once(listening, 'listening');
  port = (listening.address() as AddressInfo).port;
  const shop = await buildShop();
  const laundry = await buildLaundry(shop);
  const owner = await buildPerson(shop, 'shop_owner');
  const client = await buildPerson(shop, 'client_owner', { clientId: laundry.clientId });
  tokens = { shop: owner.token, client: client.token };
  knownIds = [laundry.clientId, laundry.storeId, laundry.bankId, ...laundry.machineIds];
}

async function close(): Promise<void> {
  agent.destroy();
  listening.closeAllConnections();
  listening.close();
  await server.close();
  await stripe.close();
}

const fuzzed = (Object.values(operations) as Operation[]).filter((o) => !streams.has(o.id));

/** The tests of every `parts`-th operation: a spec file each, so that all cores share the work. */
export function fuzzOperations(part: number, parts: number): void {
  const mine = fuzzed.filter((_, at) => at % parts === part);
  beforeAll(open);
  afterAll(close);

  it.each(mine.map((operation) => [operation.id, operation] as const))(
    '%s is answered clearly, never with a server error',
    async (id, operation) => {
      const random = seeded(seed + [...id].reduce((sum, c) => sum + c.charCodeAt(0), 0));
      const schemas = {
        params: schemaOf(operation.params),
        query: schemaOf(operation.query),
        body: schemaOf(operation.body),
      };
      const wrong: unknown[] = [];
      for (let done = 0; done < bodiesEach && wrong.length === 0; done += atOnce) {
        const batch = Array.from({ length: Math.min(atOnce, bodiesEach - done) }, () =>
          build(operation, schemas, random),
        );
        await Promise.all(
          batch.map(async (sent) => {
            const answer = await send(operation, sent);
            // 502: the card payment service is not there in this test; that is a clear answer too.
            const serverError = answer.status >= 500 && answer.status !== 502;
            const unclear =
              answer.status >= 400 && !answer.type.startsWith('application/problem+json');
            if (serverError || unclear) {
              wrong.push({
                sent: { ...sent, body: sent.body?.slice(0, 400) },
                status: answer.status,
                text: answer.text.slice(0, 300),
              });
            }
          }),
        );
      }
      expect(wrong).toEqual([]);
    },
    300_000,
  );
}
