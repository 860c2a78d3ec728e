/**
 * What the browser takes from the contracts: types, which cost nothing, and generated tables.
 * No zod, which would weigh more than a page.
 */
import type { z } from 'zod';
import type { Operations } from './operations';

export { routes, type Route } from './generated/routes';
export { formRules, type FieldRule } from './generated/form-rules';
export type { FieldError, ProblemDocument, ProblemType } from './problems';
export type { Permission, Role } from './permissions';
export type * from './enums';
export type { Page } from './lists';

export type OperationId = keyof Operations;
type Part<Id extends OperationId, P extends string> =
  Operations[Id] extends Record<P, infer S> ? S : never;
type Input<S> = S extends z.ZodType ? z.input<S> : undefined;

export type ParamsOf<Id extends OperationId> = Input<Part<Id, 'params'>>;
export type QueryOf<Id extends OperationId> = Input<Part<Id, 'query'>>;
export type BodyOf<Id extends OperationId> = Input<Part<Id, 'body'>>;
export type AnswerOf<Id extends OperationId> =
  Part<Id, 'answer'> extends z.ZodType ? z.output<Part<Id, 'answer'>> : void;
