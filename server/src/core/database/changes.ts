import { type Bind } from './tenancy';

/**
 * The `set` list of an update that changes only what the caller sent. Column names come from
 * `columns`, never from the request; a value that is an object goes into a jsonb column.
 */
export function changes<B extends object>(
  body: B,
  columns: { [K in keyof B]-?: string },
): { set: string; bind: Bind } {
  const bind: Bind = {};
  const set = ['updated_at = now()'];
  for (const [field, column] of Object.entries(columns) as [keyof B & string, string][]) {
    const value = body[field];
    if (value === undefined) continue;
    bind[field] = typeof value === 'object' && value !== null ? JSON.stringify(value) : value;
    set.push(`${column} = $${field}`);
  }
  return { set: set.join(', '), bind };
}
