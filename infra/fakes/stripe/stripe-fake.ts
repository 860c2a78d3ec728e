import { type IncomingMessage, type ServerResponse } from 'node:http';
import { readBody, send, serve } from '../http';
import { apiVersion, checkAccount, makeEvent, presented, resourceFor } from './api';
import { Books } from './books';
import { type Call, newId } from './call';
import { type RequestMode, Traffic } from './control';
import { controlAnswer } from './control-routes';
import { ApiError } from './errors';
import { parseForm } from './form';
import { IdempotencyKeys } from './idempotency';
import { pageAnswer } from './page-routes';
import { type Reply } from './reply';
import { type WebhookMode, Webhooks } from './webhooks';

export interface StripeFakeOptions {
  port?: number;
  /** Where everything is kept; without it, it is gone with the process. */
  dataFile?: string;
  webhookUrl?: string;
  webhookSecret?: string;
}

export interface StripeFake {
  url: string;
  port: number;
  books: Books;
  traffic: Traffic;
  setWebhookMode(mode: WebhookMode): void;
  setRequestMode(mode: RequestMode, times?: number, path?: string): void;
  flushWebhooks(): Promise<void>;
  close(): Promise<void>;
}

export interface Fake {
  books: Books;
  traffic: Traffic;
  webhooks: Webhooks;
  /** A call for an account; `request` is noted on the events that come of it. */
  call(account: string, ids?: string[], request?: object): Call;
}

function header(request: IncomingMessage, name: string): string {
  const value = request.headers[name];
  return typeof value === 'string' ? value : '';
}

function errorReply(error: ApiError): Reply {
  return {
    status: error.status,
    headers: { 'content-type': 'application/json' },
    body: JSON.stringify({ error: error.body }, null, 2),
  };
}

function checkKey(request: IncomingMessage): void {
  if (/^Bearer (sk|rk)_/.test(header(request, 'authorization'))) return;
  throw new ApiError(401, {
    type: 'invalid_request_error',
    message: 'You did not provide an API key, or one that is not a secret key.',
  });
}

const noRequest = { id: null, idempotency_key: null };

function makeFake(options: StripeFakeOptions, url: () => string): Fake {
  const books = new Books(options.dataFile);
  const webhooks = new Webhooks(books, { url: options.webhookUrl, secret: options.webhookSecret });
  const call = (account: string, ids: string[] = [], request: object = noRequest): Call => {
    const self: Call = {
      books,
      account,
      ids,
      params: {},
      url: url(),
      now: Math.floor(Date.now() / 1000),
      emit(type, thing) {
        // Everything a connected account's events concern is its own, its account object too.
        const owner = thing.object === 'account' ? thing.id : account;
        const event = makeEvent({ ...self, account: owner }, type, thing, request);
        books.put(owner, event);
        webhooks.add(event);
      },
    };
    return self;
  };
  return { books, traffic: new Traffic(), webhooks, call };
}

interface Asked {
  method: string;
  url: URL;
  body: string;
  requestId: string;
}

class Api {
  private readonly keys: IdempotencyKeys;

  constructor(private readonly fake: Fake) {
    this.keys = new IdempotencyKeys(fake.books);
  }

  async answer(request: IncomingMessage, response: ServerResponse, asked: Asked): Promise<void> {
    const account = header(request, 'stripe-account');
    const key = asked.method === 'POST' ? header(request, 'idempotency-key') : '';
    const mode = this.fake.traffic.modeFor(asked.url.pathname);
    const seen = this.fake.traffic.record({
      at: new Date().toISOString(),
      method: asked.method,
      path: asked.url.pathname,
      account: account || null,
      idempotencyKey: key || null,
      params: parseForm(asked.method === 'GET' ? asked.url.search.slice(1) : asked.body),
      status: null,
    });
    if (mode === 'drop-before') {
      request.socket.destroy();
      return;
    }
    const reply = await this.reply(request, asked, { account, key, mode });
    // The work is done and the answer lost: what a caller's idempotency key is for.
    if (mode === 'drop-after') {
      request.socket.destroy();
      return;
    }
    seen.status = reply.status;
    response.writeHead(reply.status, {
      ...reply.headers,
      'request-id': asked.requestId,
      'stripe-version': apiVersion,
      ...(key ? { 'idempotency-key': key } : {}),
    });
    response.end(reply.body);
  }

  private async reply(
    request: IncomingMessage,
    asked: Asked,
    { account, key, mode }: { account: string; key: string; mode: RequestMode },
  ): Promise<Reply> {
    try {
      checkKey(request);
      if (mode === 'rate-limit') {
        const message = 'Too many requests hit the API too quickly.';
        throw new ApiError(429, { type: 'invalid_request_error', code: 'rate_limit', message });
      }
      if (mode === 'error-500') {
        throw new ApiError(500, { type: 'api_error', message: 'Something went wrong.' });
      }
      checkAccount(this.fake.books, account);
      const work = (): Promise<Reply> => Promise.resolve(this.work(asked, account, key));
      if (!key) return await work();
      const whole = `${asked.method} ${asked.url.pathname} ${asked.body}`;
      return await this.keys.answer(account, key, whole, work);
    } catch (error) {
      if (error instanceof ApiError) return errorReply(error);
      throw error;
    }
  }

  private work(asked: Asked, account: string, key: string): Reply {
    const { resource, ids } = resourceFor(asked.method, asked.url.pathname);
    const query = parseForm(asked.url.search.slice(1));
    const origin = { id: asked.requestId, idempotency_key: key || null };
    const call: Call = {
      ...this.fake.call(account, ids, origin),
      params: { ...query, ...parseForm(asked.body) },
    };
    try {
      const result = resource(call);
      const shown = presented(call, result);
      return {
        status: 200,
        headers: { 'content-type': 'application/json' },
        body: JSON.stringify(shown, null, 2),
      };
    } catch (error) {
      if (error instanceof ApiError) return errorReply(error);
      throw error;
    }
  }
}

/** A local stand-in for Stripe's HTTP API, its card page and its webhooks. */
export async function startStripeFake(options: StripeFakeOptions = {}): Promise<StripeFake> {
  let url = '';
  const fake = makeFake(options, () => url);
  const api = new Api(fake);
  const listening = await serve(async (request, response) => {
    const asked: Asked = {
      method: request.method ?? 'GET',
      url: new URL(request.url ?? '/', 'http://stripe'),
      body: await readBody(request),
      requestId: newId('req'),
    };
    const path = asked.url.pathname;
    if (path.startsWith('/v1/')) return api.answer(request, response, asked);
    const answer = path.startsWith('/fake/')
      ? await controlAnswer(fake, asked.method, asked.url, asked.body)
      : pageAnswer(fake, asked.method, asked.url, asked.body);
    send(response, answer);
  }, options.port ?? 0);
  url = listening.url;
  fake.webhooks.start();
  return {
    url,
    port: listening.port,
    books: fake.books,
    traffic: fake.traffic,
    setWebhookMode: (mode) => fake.webhooks.setMode(mode),
    setRequestMode: (mode, times, path) => fake.traffic.set(mode, times, path),
    flushWebhooks: () => fake.webhooks.flush(),
    async close() {
      await listening.close();
      await fake.webhooks.close();
    },
  };
}
