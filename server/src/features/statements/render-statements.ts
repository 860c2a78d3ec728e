import { v7 as uuid } from 'uuid';
import { type Config } from '../../core/config';
import { type Context, systemContext } from '../../core/context';
import { databaseIsAway } from '../../core/database/away';
import { withTenant, write } from '../../core/database/tenancy';
import { render } from '../../core/documents/render-pool';
import { files } from '../../core/files/file-store';
import { type Job } from '../../core/jobs/work';
import { announceAll } from '../../core/live/live';
import { type Log } from '../../core/logging';
import { type ShopFacts, shopFacts } from '../../core/shop-facts';
import { queueStatementMails } from '../deliveries/queue-statement-mails';
import { type RunJob } from './build-statements';
import { moveRun } from './move-run';
import { mostTries, wordsOf } from './note-failures';
import { type StatementSheet, statementPdf } from './statement-pdf';
import { type StoredSnapshot } from './stored-snapshot';

const batch = 20;
/** Longer than rendering a batch may take; after it another attempt takes over. */
const leaseSeconds = 20;

interface Claimed {
  id: string;
  attempt: number;
  statementId: string;
  number: number;
  clientId: string;
  snapshot: StoredSnapshot;
}

interface Rendered extends Claimed {
  sha256: string;
  bytes: number;
}

export const renderStatementsJob: Job = {
  queue: 'statements-render',
  async work(data, { config, log }) {
    const { shopId, runId } = data as unknown as RunJob;
    await renderStatements(systemContext(shopId, new Date()), runId, config, log);
  },
};

/** Renders what is built of a run, batch by batch, and puts the mails in line that carry it. */
export async function renderStatements(
  context: Context,
  runId: string,
  config: Config,
  log: Log,
): Promise<void> {
  const shop = await withTenant(context, () => shopFacts(context));
  for (;;) {
    const claimed = await withTenant(context, () => claim(context, runId));
    if (claimed.length === 0) break;
    await renderBatch(context, shop, claimed, config, log);
    await moveRun(context, runId, ['send']);
  }
  await moveRun(context, runId, ['send']);
}

function claim(context: Context, runId: string): Promise<Claimed[]> {
  return write<Claimed>(
    `update statement_run_stores r
     set attempt = r.attempt + 1, lease_until = now() + interval '${leaseSeconds} seconds'
     from (
       select c.id from statement_run_stores c
       join statement_runs u on u.shop_id = c.shop_id and u.id = c.run_id and u.state <> 'held'
       where c.shop_id = $shopId and c.run_id = $runId and c.state = 'built'
         and (c.lease_until is null or c.lease_until < now())
       order by c.statement_id limit ${batch}
       for update of c skip locked
     ) due, statements s
     where r.shop_id = $shopId and r.id = due.id
       and s.shop_id = r.shop_id and s.id = r.statement_id
     returning r.id, r.attempt, s.id as "statementId", s.number, s.client_id as "clientId",
       s.snapshot`,
    { shopId: context.shopId, runId },
  );
}

/** Renders each by itself, then writes all that went well down in one transaction. */
async function renderBatch(
  context: Context,
  shop: ShopFacts,
  claimed: readonly Claimed[],
  config: Config,
  log: Log,
): Promise<void> {
  const rendered: Rendered[] = [];
  const trouble = async (statement: Claimed, error: unknown) => {
    log.error({ err: error, statementId: statement.statementId }, 'a statement was not rendered');
    await noteUnrendered(context, statement, error);
  };
  const render = async (statement: Claimed) => {
    const pdf = await pdfOf(shop, statement.snapshot);
    const sha256 = await files().put(context.shopId, pdf);
    rendered.push({ ...statement, sha256, bytes: pdf.length });
  };
  await Promise.all(
    claimed.map((statement) => render(statement).catch((error) => trouble(statement, error))),
  );
  await keepBatch(context, rendered, config, trouble);
}

/** One that cannot be kept must not keep the others from being sent: then each is tried alone. */
async function keepBatch(
  context: Context,
  rendered: readonly Rendered[],
  config: Config,
  trouble: (statement: Claimed, error: unknown) => Promise<void>,
): Promise<void> {
  const [first, ...others] = rendered;
  if (!first) return;
  try {
    await withTenant(context, () => keep(context, rendered, config));
  } catch (error) {
    if (databaseIsAway(error)) throw error;
    if (others.length === 0) return trouble(first, error);
    for (const each of rendered) await keepBatch(context, [each], config, trouble);
  }
}

async function noteUnrendered(context: Context, statement: Claimed, error: unknown): Promise<void> {
  await withTenant(context, () =>
    write(
      `update statement_run_stores set lease_until = null, last_error = $words,
         state = case when attempt >= ${mostTries} then 'failed' else state end
       where shop_id = $shopId and id = $id and attempt = $attempt and state = 'built'`,
      {
        shopId: context.shopId,
        id: statement.id,
        attempt: statement.attempt,
        words: wordsOf(error),
      },
    ),
  );
}

export function pdfOf(shop: ShopFacts, snapshot: StoredSnapshot): Promise<Buffer> {
  const { name, address, phone, taxNumber, locale } = shop;
  const sheet: StatementSheet = { shop: { name, address, phone, taxNumber, locale }, snapshot };
  return render('statement', sheet, statementPdf);
}

/** Only the attempt that holds a row writes it; a slow one that lost it changes nothing. */
async function keep(
  context: Context,
  rendered: readonly Rendered[],
  config: Config,
): Promise<void> {
  const held = await write<{ id: string }>(
    `update statement_run_stores r set state = 'rendered', lease_until = null, last_error = null
     from jsonb_to_recordset($rendered::jsonb) as d (id uuid, attempt integer)
     where r.shop_id = $shopId and r.id = d.id and r.attempt = d.attempt and r.state = 'built'
     returning r.id`,
    {
      shopId: context.shopId,
      rendered: JSON.stringify(rendered.map(({ id, attempt }) => ({ id, attempt }))),
    },
  );
  const ids = new Set(held.map(({ id }) => id));
  const mine = rendered.filter(({ id }) => ids.has(id));
  if (mine.length === 0) return;
  await write(
    `insert into attachments (shop_id, id, client_id, owner_kind, owner_id, name, content_type, bytes, sha256)
     select $shopId, a.id, a.client_id, 'statement', a.owner_id, a.name, 'application/pdf', a.bytes, a.sha256
     from jsonb_to_recordset($files::jsonb)
       as a (id uuid, client_id uuid, owner_id uuid, name text, bytes bigint, sha256 text)`,
    { shopId: context.shopId, files: JSON.stringify(mine.map(attachment)) },
  );
  const statementIds = mine.map(({ statementId }) => statementId);
  await queueStatementMails(context, statementIds, config.mail.from);
  await announceAll(
    context,
    'statement',
    mine.map(({ statementId: id, clientId }) => ({ id, clientId })),
  );
}

function attachment({ clientId, statementId, number, bytes, sha256 }: Rendered) {
  return {
    id: uuid(),
    client_id: clientId,
    owner_id: statementId,
    name: `statement-${String(number).padStart(4, '0')}.pdf`,
    bytes,
    sha256,
  };
}
