import pg from 'pg';

export interface Statement {
  text: string;
  values: unknown[];
  /** The number a counter gave, which later statements carry. */
  counted?: number;
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
    if (text) {
      const values = asObject?.values ?? (Array.isArray(second) ? second : []);
      const statement: Statement = { text, values };
      statements.push(statement);
      if (text.includes('insert into counters')) noteCount(statement, args);
    }
    return original.apply(this, args);
  };
  try {
    await work();
  } finally {
    prototype.query = original;
  }
  return statements;
}

/** Listens in on the answer, which Sequelize takes by callback. */
function noteCount(statement: Statement, args: unknown[]): void {
  const answer = args.at(-1);
  if (typeof answer !== 'function') return;
  args[args.length - 1] = (error: unknown, result: { rows: { value: number }[] } | undefined) => {
    statement.counted = result?.rows[0]?.value;
    (answer as (error: unknown, result: unknown) => void)(error, result);
  };
}
