import { z } from 'zod';
import { type Operation, storesAnswer, successStatus } from './operation';
import { problemDocument, problemTypes, type ProblemType } from './problems';

type Json = Record<string, unknown>;

/** The problem types an operation can answer with: those its shape implies, and its own. */
export function problemsOf(operation: Operation): ProblemType[] {
  const list = new Set<ProblemType>(['malformed-request', 'too-many-requests', 'unavailable']);
  if (operation.params || operation.query || operation.body) list.add('invalid-request');
  if (operation.params) list.add('not-found');
  if (operation.body) list.add('too-large').add('unsupported-content');
  if (operation.permission !== 'public') list.add('not-signed-in');
  if (operation.permission !== 'public' && operation.permission !== 'signed-in')
    list.add('not-allowed');
  if (operation.ifMatch) list.add('version-required').add('stale-version');
  if (storesAnswer(operation)) list.add('key-required').add('key-reused');
  if (isRefusedWhilePaused(operation)) list.add('shop-paused');
  for (const type of operation.problems ?? []) list.add(type);
  return [...list];
}

/** A paused shop's people write nothing in it; their own accounts and the platform go on. */
function isRefusedWhilePaused({ method, permission, whilePaused }: Operation): boolean {
  const ofShop =
    !['public', 'signed-in'].includes(permission) && !permission.startsWith('platform.');
  return method !== 'GET' && ofShop && !whilePaused;
}

/** The OpenAPI 3.1 document of `operations`. */
export function openApiDocument(operations: Record<string, Operation>, version: string): Json {
  const paths: Record<string, Json> = {};
  for (const operation of Object.values(operations)) {
    const path = operation.path.replaceAll(/:(\w+)/g, '{$1}');
    (paths[path] ??= {})[operation.method.toLowerCase()] = describe(operation);
  }
  return {
    openapi: '3.1.0',
    info: { title: 'Tumblewright', version },
    paths,
    components: {
      schemas: { Problem: jsonSchema(problemDocument, 'output') },
      securitySchemes: { accessToken: { type: 'http', scheme: 'bearer', bearerFormat: 'JWT' } },
    },
  };
}

function describe(operation: Operation): Json {
  return {
    operationId: operation.id,
    summary: operation.summary,
    'x-permission': operation.permission,
    security: operation.permission === 'public' ? [] : [{ accessToken: [] }],
    parameters: [
      ...parameters(operation.params, 'path'),
      ...parameters(operation.query, 'query'),
      ...(operation.ifMatch ? [header('If-Match', 'The version that was read, in quotes')] : []),
      ...(storesAnswer(operation)
        ? [header('Idempotency-Key', 'Made by the caller; a repeat gets the first answer')]
        : []),
    ],
    ...(operation.body || operation.bodyType ? { requestBody: requestBody(operation) } : {}),
    responses: { [successStatus(operation)]: success(operation), ...problemResponses(operation) },
  };
}

function requestBody(operation: Operation): Json {
  const schema: Json = operation.body ? jsonSchema(operation.body, 'input') : { type: 'object' };
  if (operation.bodyType === 'multipart/form-data') {
    const properties = (schema.properties ?? {}) as Json;
    const required = (schema.required ?? []) as string[];
    schema.properties = { ...properties, file: { type: 'string', format: 'binary' } };
    schema.required = [...required, 'file'];
  }
  const required = operation.bodyType !== undefined || !operation.body?.safeParse({}).success;
  return { required, content: { [operation.bodyType ?? 'application/json']: { schema } } };
}

function success(operation: Operation): Json {
  if (!operation.answer && !operation.answerType) return { description: 'Done' };
  const schema = operation.answer ? jsonSchema(operation.answer, 'output') : {};
  return {
    description: 'Done',
    content: { [operation.answerType ?? 'application/json']: { schema } },
  };
}

function problemResponses(operation: Operation): Json {
  const byStatus = new Map<number, ProblemType[]>();
  for (const type of problemsOf(operation)) {
    const status = problemTypes[type].status;
    byStatus.set(status, [...(byStatus.get(status) ?? []), type]);
  }
  return Object.fromEntries(
    [...byStatus].map(([status, types]) => [
      status,
      {
        description: types.map((type) => problemTypes[type].title).join('; '),
        'x-problem-types': types,
        content: {
          'application/problem+json': { schema: { $ref: '#/components/schemas/Problem' } },
        },
      },
    ]),
  );
}

function parameters(shape: z.ZodObject | undefined, where: 'path' | 'query'): Json[] {
  if (!shape) return [];
  const schema = jsonSchema(shape, 'input') as {
    properties?: Record<string, Json>;
    required?: string[];
  };
  return Object.entries(schema.properties ?? {}).map(([name, property]) => ({
    name,
    in: where,
    required: where === 'path' || (schema.required ?? []).includes(name),
    schema: property,
  }));
}

function header(name: string, description: string): Json {
  return { name, in: 'header', required: true, description, schema: { type: 'string' } };
}

function jsonSchema(schema: z.ZodType, io: 'input' | 'output'): Json {
  const { $schema: _, ...rest } = z.toJSONSchema(schema, {
    io,
    target: 'draft-2020-12',
    unrepresentable: 'any',
  }) as Json;
  return rest;
}
