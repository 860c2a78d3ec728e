import { z } from 'zod';

type SortKeys = readonly [string, ...string[]];

function paging<const S extends SortKeys>(sort: S) {
  return {
    cursor: z
      .string()
      .regex(/^[A-Za-z0-9_-]{1,600}$/)
      .optional(),
    limit: z.coerce.number().int().min(1).max(100).default(25),
    sort: z.enum(sort).default(sort[0] as S[number]),
    /** Words to search for. */
    q: z
      .string()
      .max(100)
      .refine((v) => v.isWellFormed() && !v.includes('\u0000'), { error: 'cannot be searched for' })
      .optional(),
  };
}

type Paging<S extends SortKeys> = ReturnType<typeof paging<S>>;

/**
 * Keyset lists: a page is what comes after `cursor` in the order of `sort`. Cursors are made by the
 * server and mean nothing to the caller.
 */
export function listQuery<const S extends SortKeys>(options: {
  sort: S;
}): z.ZodObject<Paging<S>, z.core.$strict>;
export function listQuery<const S extends SortKeys, F extends z.core.$ZodLooseShape>(options: {
  sort: S;
  filters: F;
}): z.ZodObject<Paging<S> & F, z.core.$strict>;
export function listQuery(options: { sort: SortKeys; filters?: z.core.$ZodLooseShape }) {
  return z.strictObject({ ...paging(options.sort), ...options.filters });
}

/** `count` stops at 1,000 (`capped`), because counting all of a large list costs more than it tells. */
export function listOf<T extends z.ZodType>(item: T) {
  return z.object({
    items: z.array(item),
    next: z.string().nullable(),
    count: z.object({ value: z.int(), capped: z.boolean() }),
  });
}

export interface Page<T> {
  items: T[];
  next: string | null;
  count: { value: number; capped: boolean };
}
