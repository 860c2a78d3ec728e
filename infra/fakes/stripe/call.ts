import { randomBytes } from 'node:crypto';
import { type Books, type Thing } from './books';
import { invalid, missing, noSuch } from './errors';
import { type Param, type Params } from './form';

/** What a resource's function is given: the request, and what it may change. */
export interface Call {
  books: Books;
  account: string;
  /** The parts of the path that were variable. */
  ids: string[];
  params: Params;
  /** Records an event of the account and hands it to the webhooks. */
  emit(type: string, thing: Thing): void;
  /** The fake's own address, for pages it serves. */
  url: string;
  now: number;
}

export type Resource = (call: Call) => Thing | Record<string, unknown>;

/** Method, path with `:` for a variable part, function. */
export type Route = readonly [method: string, path: string, resource: Resource];

export function newId(prefix: string): string {
  return `${prefix}_${randomBytes(12).toString('base64url').replace(/[-_]/g, 'x')}`;
}

export function text(call: Call, name: string): string | undefined {
  const value = call.params[name];
  return typeof value === 'string' && value !== '' ? value : undefined;
}

export function required(call: Call, name: string): string {
  const value = text(call, name);
  if (value === undefined) throw missing(name);
  return value;
}

export function whole(value: Param | undefined, name: string): number | undefined {
  if (value === undefined || value === '') return undefined;
  const number = Number(value);
  if (typeof value !== 'string' || !Number.isSafeInteger(number)) {
    throw invalid(`Invalid integer: ${JSON.stringify(value)}`, 'parameter_invalid_integer', name);
  }
  return number;
}

export function flag(value: Param | undefined): boolean {
  return value === 'true';
}

export function record(value: Param | undefined): Params {
  return typeof value === 'object' && !Array.isArray(value) ? value : {};
}

export function list(value: Param | undefined): Param[] {
  return Array.isArray(value) ? value : [];
}

/** Metadata is merged; an empty value takes a key away. */
export function metadata(value: Param | undefined, before: unknown = {}): Record<string, string> {
  const merged = { ...(before as Record<string, string>) };
  for (const [key, entry] of Object.entries(record(value))) {
    if (entry === '') delete merged[key];
    else merged[key] = String(entry);
  }
  return merged;
}

export function find(call: Call, object: string, id: string | undefined): Thing {
  const thing = id === undefined ? undefined : call.books.get(call.account, id);
  if (!thing || thing.object !== object) throw noSuch(object, id ?? '');
  return thing;
}

/** A change of an object: what is kept is a new object, so that events hold what was. */
export function change(call: Call, thing: Thing, changes: Record<string, unknown>): Thing {
  return call.books.put(call.account, { ...thing, ...changes });
}

export function retrieve(object: string): Resource {
  return (call) => find(call, object, call.ids[0]);
}

function inRange(thing: Thing, created: Param | undefined): boolean {
  if (created === undefined) return true;
  if (typeof created === 'string') return thing.created === Number(created);
  const range = record(created);
  const holds = (name: string, test: (bound: number) => boolean): boolean =>
    range[name] === undefined || test(Number(range[name]));
  return (
    holds('gte', (bound) => thing.created >= bound) &&
    holds('gt', (bound) => thing.created > bound) &&
    holds('lte', (bound) => thing.created <= bound) &&
    holds('lt', (bound) => thing.created < bound)
  );
}

/** A page of objects: newest first, by cursor, filtered by the named fields and `created`. */
export function paged(call: Call, things: Thing[], filters: readonly string[] = []) {
  const limit = whole(call.params.limit, 'limit') ?? 10;
  if (limit < 1 || limit > 100) {
    throw invalid('This value must be between 1 and 100.', undefined, 'limit');
  }
  const wanted = things.filter(
    (thing) =>
      inRange(thing, call.params.created) &&
      filters.every((name) => call.params[name] === undefined || thing[name] === call.params[name]),
  );
  const position = (name: string): number => {
    const id = text(call, name);
    const at = id === undefined ? -1 : wanted.findIndex((thing) => thing.id === id);
    if (id !== undefined && at < 0)
      throw invalid(`No such object: ${id}`, 'resource_missing', name);
    return at;
  };
  const after = position('starting_after');
  const before = position('ending_before');
  const start = before >= 0 ? Math.max(0, before - limit) : after + 1;
  const end = before >= 0 ? before : start + limit;
  return {
    object: 'list',
    data: wanted.slice(start, end),
    has_more: before >= 0 ? start > 0 : end < wanted.length,
    url: '',
  };
}

export function listOf(object: string, filters: readonly string[] = []): Resource {
  return (call) => paged(call, call.books.all(call.account, object), filters);
}
