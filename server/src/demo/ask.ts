import { type Operation, type OperationId, operations, storesAnswer } from '@lib/contracts';
import { type AnswerOf, type BodyOf, type ParamsOf, type QueryOf } from '@lib/contracts/web';
import { type Context } from '../core/context';
import { withTenant } from '../core/database/tenancy';
import { type Route } from '../core/http/route';
import { routes } from '../routes';

interface Asked<Id extends OperationId> {
  params?: ParamsOf<Id>;
  query?: QueryOf<Id>;
  body?: BodyOf<Id>;
  version?: number;
  file?: { name: string; content: Buffer };
}

const byId = new Map<string, Route>();

/**
 * Uses the product as a person would, at a moment of the past: the demo is made of what people do,
 * so it can hold nothing the product would refuse.
 */
export async function ask<Id extends OperationId>(
  context: Context,
  id: Id,
  asked: Asked<Id> = {},
): Promise<AnswerOf<Id>> {
  if (byId.size === 0) for (const route of routes) byId.set(route.operation.id, route);
  const route = byId.get(id);
  if (!route) throw new Error(`${id} has no handler`);
  const operation = operations[id] as Operation;
  const input = {
    params: operation.params?.parse(asked.params ?? {}),
    query: operation.query?.parse(asked.query ?? {}),
    body: operation.body?.parse(asked.body ?? {}),
    version: asked.version ?? 0,
    file: asked.file,
  };
  const work = () =>
    route.handler(context as never, input as never, {} as never) as Promise<AnswerOf<Id>>;
  try {
    return await (operation.method !== 'GET' &&
    (operation.method !== 'POST' || storesAnswer(operation))
      ? withTenant(context, work)
      : work());
  } catch (error) {
    throw new Error(`${id} at ${context.now.toISOString()}: ${JSON.stringify(error)}`, {
      cause: error,
    });
  }
}
