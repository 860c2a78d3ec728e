import { HttpErrorResponse } from '@angular/common/http';
import { type FieldError, type ProblemDocument, type ProblemType } from '@lib/contracts/web';

/** What can go wrong with a call: what the server says, or that it said nothing. */
export type ProblemKind = ProblemType | 'no-answer';

/** A call that failed, in the words the server found for it (RFC 9457). */
export class Problem extends Error {
  constructor(
    readonly kind: ProblemKind,
    readonly status: number,
    readonly title: string,
    readonly detail?: string,
    readonly errors: readonly FieldError[] = [],
    readonly requestId?: string,
  ) {
    super(detail ?? title);
    this.name = 'Problem';
  }

  /** Nothing is known of whether the server did it: a repeat must be the same request. */
  get unanswered(): boolean {
    return this.kind === 'no-answer' || this.status >= 500;
  }
}

export function isProblem(error: unknown, kind?: ProblemKind): error is Problem {
  return error instanceof Problem && (kind === undefined || error.kind === kind);
}

const noAnswer = () =>
  new Problem('no-answer', 0, 'There was no answer. Check the connection and try again.');

export function problemFrom(error: unknown): Problem {
  if (error instanceof Problem) return error;
  if (!(error instanceof HttpErrorResponse) || error.status === 0) return noAnswer();
  const document = documentIn(error.error);
  if (!document) {
    // What the service worker answers by itself when it finds no connection.
    if (error.status === 504) return noAnswer();
    // A proxy's page or a cut-off answer: not from the API itself.
    const kind: ProblemKind = error.status === 404 ? 'not-found' : 'unavailable';
    return new Problem(kind, error.status, 'The service did not answer as expected. Try again.');
  }
  return new Problem(
    kindOf(document.type),
    error.status,
    document.title,
    document.detail,
    document.errors ?? [],
    document.requestId,
  );
}

/** Types are addresses, `/problems/not-found`; the last part is the name. */
function kindOf(type: string): ProblemKind {
  return (type.split('/').at(-1) || 'internal') as ProblemKind;
}

function documentIn(body: unknown): ProblemDocument | undefined {
  const value = typeof body === 'string' ? parsed(body) : body;
  const document = value as Partial<ProblemDocument> | null | undefined;
  return typeof document === 'object' && typeof document?.title === 'string'
    ? (document as ProblemDocument)
    : undefined;
}

function parsed(text: string): unknown {
  try {
    return JSON.parse(text);
  } catch {
    return undefined;
  }
}
