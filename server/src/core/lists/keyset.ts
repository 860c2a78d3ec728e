import { type Page } from '@lib/contracts';
import { type Bind, platformRows, rows } from '../database/tenancy';
import { invalid } from '../problems/problem';

/** A column to sort by, ending in the id so that the order is total. */
export interface SortKey {
  column: string;
  type: 'text' | 'date' | 'timestamptz' | 'bigint';
  descending?: boolean;
}

export interface ListSource {
  /** `select ... from ...` without where; its columns are the row's. */
  select: string;
  /** Conditions that always hold and that the filters add, joined by `and`. */
  where: string[];
  bind: Bind;
  sort: SortKey;
  /** The id that ends every order, e.g. `s.id`. */
  id: string;
  /** Default: a UUID; ids that others made are text. */
  idType?: 'uuid' | 'text';
  limit: number;
  cursor: string | undefined;
  /** What `count` counts, e.g. `stores s`; default: the select's from. */
  from: string;
}

const countCap = 1000;

/** One page of a keyset list, and how many rows there are up to a cap. */
export function page<R extends object, T>(
  source: ListSource,
  present: (row: R) => T,
): Promise<Page<T>> {
  return pageBy(rows, source, present);
}

/** The same of what the platform role sees. */
export function platformPage<R extends object, T>(
  source: ListSource,
  present: (row: R) => T,
): Promise<Page<T>> {
  return pageBy(platformRows, source, present);
}

async function pageBy<R extends object, T>(
  ask: typeof rows,
  source: ListSource,
  present: (row: R) => T,
): Promise<Page<T>> {
  const { sort, idType = 'uuid' } = source;
  const order = sort.descending ? 'desc' : 'asc';
  const after = source.cursor === undefined ? undefined : readCursor(source.cursor, idType);
  const where = [...source.where];
  const bind = { ...source.bind };
  if (after) {
    const compare = sort.descending ? '<' : '>';
    where.push(
      `(${sort.column}, ${source.id}) ${compare} ($afterValue::${sort.type}, $afterId::${idType})`,
    );
    bind.afterValue = after[0];
    bind.afterId = after[1];
  }
  const found = await ask<R & { sort_value: string; sort_id: string }>(
    `${source.select.replace(/^\s*select/i, `select (${sort.column})::text as sort_value, ${source.id} as sort_id,`)}
     where ${where.join(' and ')}
     order by ${sort.column} ${order}, ${source.id} ${order}
     limit ${source.limit + 1}`,
    bind,
  );
  const [count] = await ask<{ n: number }>(
    `select count(*)::int as n from (select 1 from ${source.from}
     where ${source.where.join(' and ')} limit ${countCap + 1}) counted`,
    source.bind,
  );
  const items = found.slice(0, source.limit);
  const last = items.at(-1);
  const n = count?.n ?? 0;
  return {
    items: items.map(present),
    next: found.length > source.limit && last ? writeCursor(last.sort_value, last.sort_id) : null,
    count: { value: Math.min(n, countCap), capped: n > countCap },
  };
}

function writeCursor(value: string, id: string): string {
  return Buffer.from(JSON.stringify([value, id])).toString('base64url');
}

const idShapes = {
  uuid: /^[0-9a-f]{8}(-[0-9a-f]{4}){3}-[0-9a-f]{12}$/,
  text: /^[\w-]{1,200}$/,
};

function readCursor(cursor: string, idType: 'uuid' | 'text'): [string, string] {
  try {
    const read = JSON.parse(Buffer.from(cursor, 'base64url').toString('utf8')) as unknown;
    if (Array.isArray(read) && read.length === 2) {
      const [value, id] = read as [unknown, unknown];
      if (
        typeof value === 'string' &&
        typeof id === 'string' &&
        idShapes[idType].test(id) &&
        !value.includes('\u0000')
      )
        return [value, id];
    }
  } catch {
    // Falls through to the same answer as any other cursor we did not write.
  }
  throw invalid([{ pointer: '/cursor', in: 'query', detail: 'is not a cursor of this list' }]);
}

/** A condition for words to search for: the folded text holds them. Escapes the wildcards of LIKE. */
export function searched(q: string | undefined, columns: string[], bind: Bind): string[] {
  if (!q?.trim()) return [];
  bind.q = `%${q
    .trim()
    .toLowerCase()
    .replace(/[\\%_]/g, '\\$&')}%`;
  return [`app.fold(${columns.map((c) => `coalesce(${c}, '')`).join(" || ' ' || ")}) like $q`];
}
