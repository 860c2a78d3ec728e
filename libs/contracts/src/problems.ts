import { z } from 'zod';

/**
 * The kinds of problem the API answers with (RFC 9457). `type` is the stable name a program may
 * branch on; `title` is for people and may be reworded.
 */
export const problemTypes = {
  'malformed-request': { status: 400, title: 'The request could not be read' },
  'invalid-request': { status: 422, title: 'Some values are not right' },
  'key-required': { status: 400, title: 'An Idempotency-Key header is needed' },
  'key-reused': { status: 422, title: 'This Idempotency-Key was used for another request' },
  'not-signed-in': { status: 401, title: 'Sign in to go on' },
  'sign-in-refused': { status: 401, title: 'E-mail address or password is not right' },
  'code-required': { status: 401, title: 'A one-time code is needed' },
  'not-allowed': { status: 403, title: 'Your role may not do this' },
  'shop-paused': {
    status: 403,
    title: 'The shop is paused: everything can be read, nothing changed',
  },
  'plan-limit': { status: 403, title: 'The plan of the shop has reached a limit' },
  'not-found': { status: 404, title: 'There is nothing here' },
  conflict: { status: 409, title: 'This does not go together with what is stored' },
  'version-required': { status: 428, title: 'An If-Match header with the version is needed' },
  'stale-version': { status: 412, title: 'Somebody changed this in the meantime' },
  'too-large': { status: 413, title: 'The request is too large' },
  'unsupported-content': { status: 415, title: 'This kind of content is not taken here' },
  'too-many-requests': { status: 429, title: 'Too many requests: wait a little' },
  'card-payment-failed': {
    status: 502,
    title: 'The card payment service did not answer as expected',
  },
  unavailable: { status: 503, title: 'The service cannot answer right now: try again' },
  internal: { status: 500, title: 'Something went wrong on our side' },
} as const satisfies Record<string, { status: number; title: string }>;

export type ProblemType = keyof typeof problemTypes;

export const fieldError = z.object({
  /** RFC 6901 JSON pointer into the body, or into the query when `in` says so. */
  pointer: z.string(),
  in: z.enum(['body', 'query', 'params']).optional(),
  detail: z.string(),
});

export const problemDocument = z.object({
  type: z.string(),
  title: z.string(),
  status: z.int(),
  detail: z.string().optional(),
  instance: z.string().optional(),
  requestId: z.string().optional(),
  errors: z.array(fieldError).optional(),
});

export type FieldError = z.infer<typeof fieldError>;
export type ProblemDocument = z.infer<typeof problemDocument>;
