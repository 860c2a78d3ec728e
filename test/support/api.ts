import {
  type OperationId,
  operations,
  type Operation,
  problemsOf,
  storesAnswer,
} from '@lib/contracts';
import { type Express } from 'express';
import request, { type Response } from 'supertest';
import { v7 as uuid } from 'uuid';

export interface Ask {
  params?: Record<string, string>;
  query?: Record<string, unknown>;
  body?: unknown;
  version?: number;
  /** The Idempotency-Key; a fresh one by default. */
  key?: string;
  file?: { name: string; content: Buffer };
}

/** Calls operations by their ids, as one person: `api(app, office.token).call('stores.list')`. */
export function api(app: Express, token?: string) {
  return {
    async call(id: OperationId, ask: Ask = {}): Promise<Response> {
      const operation = operations[id] as Operation;
      const path = operation.path.replaceAll(/:(\w+)/g, (_, name: string) =>
        encodeURIComponent(ask.params?.[name] ?? ''),
      );
      const method = operation.method.toLowerCase() as 'get' | 'post' | 'put' | 'patch' | 'delete';
      let sent = request(app)
        [method](path)
        .query(ask.query ?? {});
      if (token) sent = sent.set('Authorization', `Bearer ${token}`);
      if (ask.version !== undefined) sent = sent.set('If-Match', `"${ask.version}"`);
      if (storesAnswer(operation)) sent = sent.set('Idempotency-Key', ask.key ?? uuid());
      if (ask.file) {
        for (const [name, value] of Object.entries(ask.body ?? {})) sent = sent.field(name, value);
        return told(operation, await sent.attach('file', ask.file.content, ask.file.name));
      }
      return told(operation, await (ask.body === undefined ? sent : sent.send(ask.body as object)));
    },
  };
}

/** Refuses a problem that the API document does not tell of: whoever reads that must be able to. */
export function told(operation: Operation, response: Response): Response {
  if (!response.type.includes('problem+json')) return response;
  const type = String(response.body.type).replace('/problems/', '');
  if (type !== 'internal' && !(problemsOf(operation) as string[]).includes(type)) {
    throw new Error(`The document of ${operation.id} does not tell of the problem ${type}.`);
  }
  return response;
}
