import { z } from 'zod';

/**
 * Keyset lists: a page is what comes after `cursor` in the order of `sort`. Cursors are made by the
 * server and mean nothing to the caller.
 */
export function listQuery<
  const S extends readonly [string, ...string[]],
  F extends z.core.$ZodLooseShape = Record<never, never>,
>(options: { sort: S; filters?: F }) {
  return z.strictObject({
    cursor: z
      .string()
      .regex(/^[A-Za-z0-9_-]{1,600}$/)
      .optional(),
    limit: z.coerce.number().int().min(1).max(100).default(25),
    sort: z.enum(options.sort).default(options.sort[0] as S[number]),
    /** Words to search for. */
    q: z
      .string()
      .max(100)
      .refine((v) => v.isWellFormed() && !v.includes('\u0000'), { error: 'cannot be searched for' })
      .optional(),
    ...(options.filters ?? ({} as F)),
  });
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
