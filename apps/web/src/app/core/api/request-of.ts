import { HttpHeaders, HttpParams } from '@angular/common/http';
import { type Route, routes } from '@lib/contracts/generated/routes';
import { type BodyOf, type OperationId, type ParamsOf, type QueryOf } from '@lib/contracts/web';
import { v7 } from 'uuid';

type Part<K extends string, V> = [V] extends [never]
  ? unknown
  : Record<never, never> extends V
    ? { [P in K]?: V }
    : { [P in K]: V };

/** What goes with a call: exactly the parts its contract names. */
export type Sent<Id extends OperationId> = Part<'params', ParamsOf<Id>> &
  Part<'query', QueryOf<Id>> &
  Part<'body', BodyOf<Id>> & {
    /** The version that was read, for operations that change a row. */
    ifMatch?: number;
    /** The Idempotency-Key of the intent; without one, this call is an intent of its own. */
    key?: string;
    /** A file to send instead of JSON. */
    upload?: FormData | Blob;
  };

/** The second argument may be left out where the contract demands nothing. */
export type SentArgs<Id extends OperationId> =
  Record<never, never> extends Sent<Id> ? [sent?: Sent<Id>] : [sent: Sent<Id>];

interface AnySent {
  params?: Record<string, string>;
  query?: Record<string, unknown>;
  body?: unknown;
  ifMatch?: number;
  key?: string;
  upload?: FormData | Blob;
}

interface CallRequest {
  readonly method: string;
  readonly url: string;
  readonly query: HttpParams;
  readonly headers: HttpHeaders;
  readonly body: unknown;
}

/** The HTTP request of an operation. */
export function requestOf(id: OperationId, sent: AnySent = {}): CallRequest {
  const [method, path, keyed]: Route = routes[id];
  let headers = new HttpHeaders();
  if (keyed || sent.key) headers = headers.set('Idempotency-Key', sent.key ?? v7());
  if (sent.ifMatch !== undefined) headers = headers.set('If-Match', `"${sent.ifMatch}"`);
  return {
    method,
    url: filledIn(path, sent.params ?? {}),
    query: queryOf(sent.query ?? {}),
    headers,
    body: sent.upload ?? sent.body ?? null,
  };
}

function filledIn(path: string, params: Record<string, string>): string {
  return path.replaceAll(/:(\w+)/g, (_, name: string) => {
    const value = params[name];
    if (value === undefined) throw new Error(`${path} needs "${name}"`);
    return encodeURIComponent(value);
  });
}

function queryOf(query: Record<string, unknown>): HttpParams {
  let params = new HttpParams();
  for (const [name, value] of Object.entries(query)) {
    if (value === undefined || value === null || value === '') continue;
    for (const one of Array.isArray(value) ? value : [value]) {
      params = params.append(name, String(one));
    }
  }
  return params;
}
