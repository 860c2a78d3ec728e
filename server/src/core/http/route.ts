import { type Operation, type OperationId, operations, type Operations } from '@lib/contracts';
import { type Request, type Response } from 'express';
import { type z } from 'zod';
import {
  type Context,
  type PlatformContext,
  type PublicContext,
  type SignedInContext,
} from '../context';

type Part<Id extends OperationId, P extends string> =
  Operations[Id] extends Record<P, infer S> ? S : undefined;
type Parsed<S> = S extends z.ZodType ? z.output<S> : undefined;

export interface InputOf<Id extends OperationId> {
  params: Parsed<Part<Id, 'params'>>;
  query: Parsed<Part<Id, 'query'>>;
  body: Parsed<Part<Id, 'body'>>;
  /** The version the caller read, where the operation asks for If-Match. */
  version: number;
  file?: { name: string; content: Buffer };
}

/** Who may call decides what a handler learns of the caller. */
export type ContextOf<Id extends OperationId> = Operations[Id]['permission'] extends 'public'
  ? PublicContext
  : Operations[Id]['permission'] extends 'signed-in'
    ? SignedInContext
    : Operations[Id]['permission'] extends `platform.${string}`
      ? PlatformContext
      : Context;

export type AnswerOf<Id extends OperationId> =
  Part<Id, 'answer'> extends z.ZodType ? z.input<Part<Id, 'answer'>> : void;

/** An answer that is not JSON: bytes, or a stream that writes itself. */
export class RawReply {
  constructor(readonly write: (response: Response) => void | Promise<void>) {}
}

export type Handler<Id extends OperationId> = (
  context: ContextOf<Id>,
  input: InputOf<Id>,
  http: { request: Request; response: Response },
) => Promise<AnswerOf<Id> | RawReply>;

export interface Route {
  operation: Operation;
  handler: (
    context: never,
    input: never,
    http: { request: Request; response: Response },
  ) => Promise<unknown>;
}

/** Ties an operation of the contracts to the use case that answers it. */
export function handle<Id extends OperationId>(id: Id, handler: Handler<Id>): Route {
  return { operation: operations[id] as Operation, handler: handler as Route['handler'] };
}
