import { type Bind } from '../database/tenancy';

/** A condition `column = value` for each filter that the caller set. Columns come from the code. */
export function filtered<K extends string>(
  query: { readonly [key in NoInfer<K>]?: string | undefined },
  columns: Record<K, string>,
  bind: Bind,
): string[] {
  return (Object.entries(columns) as [K, string][]).flatMap(([key, column]) => {
    const value = query[key];
    if (value === undefined) return [];
    bind[key] = value;
    return [`${column} = $${key}`];
  });
}
