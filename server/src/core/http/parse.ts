import { type FieldError, type Operation } from '@lib/contracts';
import { type Request } from 'express';
import { type z } from 'zod';
import { invalid, problem } from '../problems/problem';

/** What the contract lets through of a request: parsed values, or a problem that names each field. */
export function parseRequest(operation: Operation, request: Request) {
  return {
    params: part(operation.params, request.params, 'params'),
    query: part(operation.query, request.query, 'query'),
    body: part(operation.body, request.body, 'body'),
    version: operation.ifMatch ? versionOf(request) : 0,
  };
}

function part(schema: z.ZodType | undefined, value: unknown, where: FieldError['in']): unknown {
  if (!schema) return undefined;
  const parsed = schema.safeParse(value ?? {});
  if (parsed.success) return parsed.data;
  throw invalid(parsed.error.issues.slice(0, 50).map((issue) => fieldError(issue, where)));
}

function fieldError(issue: z.core.$ZodIssue, where: FieldError['in']): FieldError {
  const keys =
    issue.code === 'unrecognized_keys' ? [...issue.path, issue.keys[0] ?? ''] : issue.path;
  const pointer = keys
    .map((key) => `/${String(key).slice(0, 80).replaceAll('~', '~0').replaceAll('/', '~1')}`)
    .join('');
  return { pointer, in: where, detail: issue.message.slice(0, 300) };
}

/** The version in `If-Match: "3"`; a list or `*` is not a version that was read. */
function versionOf(request: Request): number {
  const header = request.get('if-match');
  if (!header) throw problem('version-required');
  const version = Number(/^"(\d{1,9})"$/.exec(header.trim())?.[1]);
  if (!Number.isInteger(version))
    throw problem('version-required', 'If-Match must be one version in quotes.');
  return version;
}
