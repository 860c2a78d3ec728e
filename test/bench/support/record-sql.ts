import pg from 'pg';

export interface Statement {
  text: string;
  values: unknown[];
}

interface Queryable {
  query: (...args: unknown[]) => unknown;
}

/** Every statement that reaches PostgreSQL from this process while `work` runs, in order. */
export async function recordSql(work: () => Promise<void>): Promise<Statement[]> {
  const statements: Statement[] = [];
  const prototype = pg.Client.prototype as unknown as Queryable;
  const original = prototype.query;
  prototype.query = function (this: unknown, ...args: unknown[]) {
    const [first, second] = args;
    const asObject =
      typeof first === 'object' && first !== null ? (first as Partial<Statement>) : undefined;
    const text = asObject?.text ?? (typeof first === 'string' ? first : undefined);
    if (text)
      statements.push({ text, values: asObject?.values ?? (Array.isArray(second) ? second : []) });
    return original.apply(this, args);
  };
  try {
    await work();
  } finally {
    prototype.query = original;
  }
  return statements;
}
