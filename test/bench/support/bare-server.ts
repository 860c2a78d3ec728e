import { createServer } from 'node:http';
import pg from 'pg';
import { v7 as uuid } from 'uuid';
import { type Statement } from './record-sql';

/**
 * What the product is measured against: node's http and pg, the same statements in the same order
 * on one connection, the rows sent as JSON. No routing, no sign-in, no checks.
 */
interface Setup {
  appUrl: string;
  pool: number;
  operations: Record<string, Statement[]>;
  /** Ids the product made while it was recorded; here made anew for each request, as it does. */
  made: string[];
}

process.once('message', (setup: Setup) => {
  const pool = new pg.Pool({ connectionString: setup.appUrl, max: setup.pool });
  const server = createServer((request, response) => {
    const statements = setup.operations[(request.url ?? '/').slice(1)] ?? [];
    void answer(pool, statements, setup.made).then(
      (rows) => {
        response.setHeader('content-type', 'application/json');
        response.end(JSON.stringify(rows));
      },
      (error: unknown) => {
        response.statusCode = 500;
        response.end(String(error));
      },
    );
  });
  server.listen(0, '127.0.0.1', () => {
    const address = server.address();
    process.send?.({ port: typeof address === 'object' ? address?.port : 0 });
  });
});

async function answer(pool: pg.Pool, statements: Statement[], made: string[]): Promise<unknown[]> {
  const fresh = new Map(made.map((id) => [id, uuid()]));
  const own = (value: unknown): unknown => {
    if (typeof value !== 'string' || fresh.size === 0) return value;
    let text = value;
    for (const [id, other] of fresh) text = text.replaceAll(id, other);
    return text;
  };
  const client = await pool.connect();
  try {
    const results: unknown[] = [];
    let counter: { recorded: number; now: number } | undefined;
    for (const { text, values, counted } of statements) {
      const ours = values.map((v) => (counter && v === counter.recorded ? counter.now : own(v)));
      const { rows } = await client.query<{ value?: number }>(text, ours);
      results.push(rows);
      if (counted !== undefined) counter = { recorded: counted, now: Number(rows[0]?.value) };
    }
    return results;
  } catch (error) {
    await client.query('rollback');
    throw error;
  } finally {
    client.release();
  }
}
