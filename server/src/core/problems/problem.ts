import { type FieldError, problemTypes, type ProblemType } from '@lib/contracts';

/** Thrown anywhere below a router; becomes an RFC 9457 problem document. */
export class Problem extends Error {
  readonly status: number;

  constructor(
    readonly type: ProblemType,
    readonly detail?: string,
    readonly errors?: FieldError[],
    readonly headers: Record<string, string> = {},
  ) {
    super(detail ?? problemTypes[type].title);
    this.status = problemTypes[type].status;
  }
}

export function problem(type: ProblemType, detail?: string): Problem {
  return new Problem(type, detail);
}

/** Absent and foreign rows are answered alike. */
export function notFound(): Problem {
  return new Problem('not-found');
}

/** Values that are well formed but not right, each with a pointer to its field. */
export function invalid(errors: FieldError[], detail?: string): Problem {
  return new Problem('invalid-request', detail, errors);
}

/** The row, or the 404 that a foreign row gets too. */
export function found<T>(row: T | null | undefined): T {
  if (row === null || row === undefined) throw notFound();
  return row;
}
