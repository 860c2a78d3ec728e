import { databaseIsAway } from '../database/away';
import { Problem, problem } from './problem';

interface PgError {
  code?: string;
  constraint?: string;
}

interface HttpError {
  status?: number;
  type?: string;
}

/** Turns whatever was thrown into a problem, and unknown things into `internal`. */
export function problemFromError(error: unknown): Problem {
  if (error instanceof Problem) return error;
  return fromDatabase(error) ?? fromHttp(error as HttpError) ?? problem('internal');
}

function fromDatabase(error: unknown): Problem | undefined {
  const original = (error as { original?: PgError }).original;
  switch (original?.code) {
    case '23505':
      return problem('conflict', 'There is one of these already.');
    case '23503':
      return problem('conflict', 'It refers to something that is not there, or is still in use.');
    case '23514':
      return problem('conflict', 'The values do not go together.');
    case '23001':
      return problem(
        'conflict',
        'This is a record and is never changed: a correction is a new one.',
      );
    case '22021':
    case '22P05':
      return problem('invalid-request', 'The text holds characters that cannot be stored.');
    case '22P02':
    case '22007':
    case '22008':
      return problem('invalid-request', 'A value is not of the kind that is expected.');
    case '22003':
      return problem('invalid-request', 'A number is too large.');
    case '40001':
    case '40P01':
      return problem('unavailable');
  }
  return databaseIsAway(error) ? problem('unavailable') : undefined;
}

function fromHttp(error: HttpError): Problem | undefined {
  if (error.type === 'entity.too.large') return problem('too-large');
  if (error.type === 'encoding.unsupported' || error.type === 'charset.unsupported') {
    return problem('unsupported-content');
  }
  const status = error.status;
  if (status === 413) return problem('too-large');
  if (status === 415) return problem('unsupported-content');
  return status && status >= 400 && status < 500 ? problem('malformed-request') : undefined;
}
