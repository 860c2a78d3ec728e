import { v7 as uuid } from 'uuid';
import { type Config } from '../../core/config';
import { type Context, systemContext } from '../../core/context';
import { databaseIsAway } from '../../core/database/away';
import { withTenant, write } from '../../core/database/tenancy';
import { render } from '../../core/documents/render-pool';
import { files } from '../../core/files/file-store';
import { type Job } from '../../core/jobs/work';
import { announce } from '../../core/live/live';
import { type Log } from '../../core/logging';
import { type ShopFacts, shopFacts } from '../../core/shop-facts';
import { queueStatementMails } from '../deliveries/queue-statement-mails';
import { type RunJob } from './build-statements';
import { moveRun } from './move-run';
import { type StatementSheet, statementPdf } from './statement-pdf';
import { type StoredSnapshot } from './stored-snapshot';

const batch = 20;
/** Longer than rendering a batch may take; after it another attempt takes over. */
const leaseSeconds = 20;
const mostTries = 3;

interface Claimed {
  id: string;
  attempt: number;
  statementId: string;
  number: number;
  clientId: string;
  snapshot: StoredSnapshot;
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
    for (const statement of claimed) await renderOne(context, shop, statement, config, log);
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

async function renderOne(
  context: Context,
  shop: ShopFacts,
  statement: Claimed,
  config: Config,
  log: Log,
): Promise<void> {
  try {
    const pdf = await pdfOf(shop, statement.snapshot);
    const sha256 = await files().put(context.shopId, pdf);
    await withTenant(context, () => keep(context, statement, sha256, pdf.length, config));
  } catch (error) {
    if (databaseIsAway(error)) throw error;
    log.error({ err: error, statementId: statement.statementId }, 'a statement was not rendered');
    await withTenant(context, () =>
      write(
        `update statement_run_stores set lease_until = null, last_error = $words,
           state = case when attempt >= ${mostTries} then 'failed' else state end
         where shop_id = $shopId and id = $id and attempt = $attempt and state = 'built'`,
        {
          shopId: context.shopId,
          id: statement.id,
          attempt: statement.attempt,
          words: (error instanceof Error ? error.message : String(error)).slice(0, 300),
        },
      ),
    );
  }
}

export function pdfOf(shop: ShopFacts, snapshot: StoredSnapshot): Promise<Buffer> {
  const { name, address, phone, taxNumber, locale } = shop;
  const sheet: StatementSheet = { shop: { name, address, phone, taxNumber, locale }, snapshot };
  return render('statement', sheet, statementPdf);
}

/** Only the attempt that holds the row writes; a slow one that lost it changes nothing. */
async function keep(
  context: Context,
  statement: Claimed,
  sha256: string,
  bytes: number,
  config: Config,
): Promise<void> {
  const bind = { shopId: context.shopId, id: statement.id, attempt: statement.attempt };
  const [mine] = await write<{ id: string }>(
    `update statement_run_stores set state = 'rendered', lease_until = null, last_error = null
     where shop_id = $shopId and id = $id and attempt = $attempt and state = 'built' returning id`,
    bind,
  );
  if (!mine) return;
  await write(
    `insert into attachments (shop_id, id, client_id, owner_kind, owner_id, name, content_type, bytes, sha256)
     values ($shopId, $id, $clientId, 'statement', $statementId, $name, 'application/pdf', $bytes, $sha256)`,
    {
      shopId: context.shopId,
      id: uuid(),
      clientId: statement.clientId,
      statementId: statement.statementId,
      name: `statement-${String(statement.number).padStart(4, '0')}.pdf`,
      bytes,
      sha256,
    },
  );
  await queueStatementMails(context, statement.statementId, config.mail.from);
  await announce(context, 'statement', statement.statementId, statement.clientId);
}
