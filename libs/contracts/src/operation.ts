import { type z } from 'zod';
import { type Permission } from './permissions';
import { type ProblemType } from './problems';

export type Method = 'GET' | 'POST' | 'PUT' | 'PATCH' | 'DELETE';

/** One thing a caller can ask of the API. Everything else about it is derived from this. */
export interface OperationShape {
  method: Method;
  /** With `:name` for parameters, each described in `params`. */
  path: `/api/${string}`;
  summary: string;
  /** Who may: a row of the authorization table, anyone signed in, or anyone at all. */
  permission: Permission | 'signed-in' | 'public';
  params?: z.ZodObject;
  query?: z.ZodObject;
  body?: z.ZodType;
  /** Absent: the answer has no body (204). */
  answer?: z.ZodType;
  /** Default: 201 for POST, 204 without an answer, else 200. */
  status?: 200 | 201 | 202 | 204;
  /** Needs `If-Match` with the version that was read. */
  ifMatch?: boolean;
  /**
   * For POST. `stored` (default): the first answer is stored under the Idempotency-Key, in the
   * transaction of the write itself. `natural`: a repeat is harmless by itself, so no key is asked
   * for. Operations open to the public are natural, having nobody to keep a key for.
   */
  idempotency?: 'stored' | 'natural';
  /** Writing is allowed though the shop is paused (pay, sign off devices, export). */
  whilePaused?: boolean;
  /** Problem types beyond those that follow from the shape. */
  problems?: readonly ProblemType[];
  bodyType?: 'application/json' | 'multipart/form-data' | 'text/csv';
  answerType?:
    | 'application/json'
    | 'application/pdf'
    | 'text/csv'
    | 'text/plain'
    | 'text/event-stream'
    | 'image/*';
}

export type Operation = OperationShape & { id: string };

/** Gives each operation its key as its id and keeps its exact types. */
export function defineOperations<const T extends Record<string, OperationShape>>(
  shapes: T,
): { [K in keyof T & string]: T[K] & { id: K } } {
  return Object.fromEntries(
    Object.entries(shapes).map(([id, shape]) => [id, { ...shape, id }]),
  ) as { [K in keyof T & string]: T[K] & { id: K } };
}

/** The status a success is answered with. */
export function successStatus(operation: OperationShape): number {
  if (operation.status) return operation.status;
  if (!operation.answer && !operation.answerType) return 204;
  return operation.method === 'POST' ? 201 : 200;
}

/** Whether a POST stores its first answer under the caller's Idempotency-Key. */
export function storesAnswer(operation: OperationShape): boolean {
  return (
    operation.method === 'POST' &&
    operation.permission !== 'public' &&
    (operation.idempotency ?? 'stored') === 'stored'
  );
}
