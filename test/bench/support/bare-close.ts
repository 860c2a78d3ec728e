import PDFDocument from 'pdfkit';
import pg from 'pg';
import { v7 as uuid } from 'uuid';
import { rubikFile } from '../../../server/src/core/documents/rubik';
import { type BenchShop } from './bench-shop';

interface Line {
  reference: string;
  description: string;
  charged: number;
  tax: number;
}

/**
 * What a close is measured against: for each store one transaction that reads its tickets and
 * writes a statement, its documents, two entries and a delivery; no domain rules, no leases, no
 * row-level security, one connection.
 */
export async function bareSql(
  superuserUrl: string,
  shop: BenchShop,
  month: string,
): Promise<Line[][]> {
  const db = new pg.Client({ connectionString: superuserUrl });
  await db.connect();
  const all: Line[][] = [];
  try {
    const run = uuid();
    await db.query(
      `insert into statement_runs (shop_id, id, month, state) values ($1, $2, $3, 'done')`,
      [shop.id, run, month],
    );
    const stores = await db.query<{ id: string; client_id: string; name: string }>(
      'select id, client_id, name from stores where shop_id = $1 order by number',
      [shop.id],
    );
    for (const [n, store] of stores.rows.entries())
      all.push(await closeStore(db, shop, run, month, store, n + 1));
  } finally {
    await db.end();
  }
  return all;
}

async function closeStore(
  db: pg.Client,
  shop: BenchShop,
  run: string,
  month: string,
  store: { id: string; client_id: string; name: string },
  number: number,
): Promise<Line[]> {
  const id = uuid();
  await db.query('begin');
  const { rows } = await db.query<Line & { ticket: string }>(
    `select t.id as ticket, 'T-' || t.number as reference, l.description, l.charged, l.tax
     from tickets t join ticket_lines l on l.shop_id = t.shop_id and l.ticket_id = t.id
     where t.shop_id = $1 and t.store_id = $2 order by t.number, l.position`,
    [shop.id, store.id],
  );
  const charged = rows.reduce((sum, line) => sum + Number(line.charged), 0);
  const tax = rows.reduce((sum, line) => sum + Number(line.tax), 0);
  const due = charged + tax;
  await db.query(
    `insert into statements (shop_id, id, client_id, store_id, run_id, month, number, issued_on, due_on, currency,
       opening, charged, tax, paid, borne_by_shop, closing, reference, snapshot, sha256)
     values ($1, $2, $3, $4, $5, $6, $7, now(), now(), 'USD', 0, $8, $9, 0, 0, $10, $11, $12, 'x')`,
    [
      shop.id,
      id,
      store.client_id,
      store.id,
      run,
      month,
      number,
      charged,
      tax,
      due,
      `R${number}`,
      JSON.stringify({ lines: rows }),
    ],
  );
  for (const ticket of new Set(rows.map((line) => line.ticket))) {
    await db.query(
      `insert into statement_documents (shop_id, statement_id, client_id, document_kind, document_id)
       values ($1, $2, $3, 'ticket', $4)`,
      [shop.id, id, store.client_id, ticket],
    );
  }
  await db.query(
    `insert into entries (shop_id, id, document_kind, document_id, line_no, account, client_id, store_id, amount, posted_on)
     values ($1, $2, 'statement', $4, 1, 'receivable', $5, $6, $7, now()), ($1, $3, 'statement', $4, 2, 'unbilled', $5, $6, -$7::bigint, now())`,
    [shop.id, uuid(), uuid(), id, store.client_id, store.id, due],
  );
  await db.query(
    `insert into deliveries (shop_id, id, client_id, kind, statement_id, recipient, dedupe_key, message_id)
     values ($1, $2, $3, 'statement', $4, 'x', $4::uuid, $4::uuid)`,
    [shop.id, uuid(), store.client_id, id],
  );
  await db.query('commit');
  return rows;
}

/** A tagged page with Rubik, a heading and the lines, straight from PDFKit, one after the other. */
export async function barePdf(all: readonly Line[][]): Promise<number> {
  let bytes = 0;
  const font = rubikFile('latin', 400);
  for (const lines of all) bytes += await onePdf(lines, font);
  return bytes;
}

function onePdf(lines: readonly Line[], font: Buffer): Promise<number> {
  return new Promise((resolve) => {
    const doc = new PDFDocument({ tagged: true, pdfVersion: '1.7' });
    let bytes = 0;
    doc.on('data', (chunk: Buffer) => (bytes += chunk.length));
    doc.on('end', () => resolve(bytes));
    doc.registerFont('body', font);
    doc.font('body').fontSize(20).text('Statement').fontSize(10);
    for (let head = 0; head < 8; head++) doc.text('A line of the head, as a letter has');
    for (const line of lines) {
      const y = doc.y;
      doc
        .text(line.reference, 72, y)
        .text(line.description, 150, y)
        .text(String(line.charged), 400, y);
      doc.text(String(line.tax), 460, y);
    }
    doc.end();
  });
}
