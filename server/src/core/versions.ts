import { notFound, problem } from './problems/problem';

/**
 * For `update ... where version = $version returning ...`: nothing returned means that the row is
 * gone or was changed meanwhile; `exists` tells which.
 */
export async function orStale<T>(
  updated: T[],
  exists: () => Promise<object | undefined>,
): Promise<T> {
  const [row] = updated;
  if (row !== undefined) return row;
  throw (await exists()) ? problem('stale-version') : notFound();
}
