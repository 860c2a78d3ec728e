import { type RunState } from '@lib/contracts';
import { checkStatement } from '@lib/domain';
import { type Context } from '../../core/context';
import { row, rows, withTenant } from '../../core/database/tenancy';
import { instantOrNull } from '../../core/database/times';
import { type AnswerOf, type InputOf } from '../../core/http/route';
import { page } from '../../core/lists/keyset';
import { found } from '../../core/problems/problem';
import { shopFacts } from '../../core/shop-facts';
import { recipientsOfStore } from '../deliveries/queue-statement-mails';
import { type StoredSnapshot } from './stored-snapshot';

type RunItem = AnswerOf<'statements.runs'>['items'][number];

interface RunRow {
  id: string;
  month: string;
  state: RunState;
  startedBy: string | null;
  startedAt: Date;
  finishedAt: Date | null;
  problem: string | null;
  stores: number;
  total: number;
  version: number;
}

const columns = `r.id, r.month, r.state,
  (select m.name from memberships m where m.shop_id = r.shop_id and m.user_id = r.started_by
   order by m.created_at limit 1) as "startedBy",
  r.started_at as "startedAt", r.finished_at as "finishedAt", r.problem,
  (select count(*)::int from statement_run_stores s
   where s.shop_id = r.shop_id and s.run_id = r.id) as stores,
  (select coalesce(sum(s.charged + s.tax), 0)::bigint from statements s
   where s.shop_id = r.shop_id and s.run_id = r.id) as total,
  r.version`;

function presentRun(run: RunRow): RunItem {
  return {
    id: run.id,
    month: run.month,
    state: run.state,
    startedBy: run.startedBy,
    startedAt: run.startedAt.toISOString(),
    finishedAt: instantOrNull(run.finishedAt),
    stores: run.stores,
    total: run.total,
    version: run.version,
  };
}

export function listRuns(
  context: Context,
  query: InputOf<'statements.runs'>['query'],
): Promise<AnswerOf<'statements.runs'>> {
  return withTenant(context, () =>
    page<RunRow, RunItem>(
      {
        select: `select ${columns} from statement_runs r`,
        from: 'statement_runs r',
        where: ['r.shop_id = $shopId'],
        bind: { shopId: context.shopId },
        sort: { column: 'r.month', type: 'text', descending: true },
        id: 'r.id',
        limit: query.limit,
        cursor: query.cursor,
      },
      presentRun,
    ),
  );
}

export function showRun(context: Context, runId: string): Promise<AnswerOf<'statements.run'>> {
  return withTenant(context, async () => {
    const bind = { shopId: context.shopId, runId };
    const run = found(
      await row<RunRow>(
        `select ${columns} from statement_runs r where r.shop_id = $shopId and r.id = $runId`,
        bind,
      ),
    );
    const counts = await storeCounts(bind);
    const mails = await mailCounts(bind);
    const progress = progressOf(run, counts, mails);
    return {
      ...presentRun(run),
      problem: run.problem,
      currency: (await shopFacts(context)).currency,
      counts,
      mails,
      progress,
      secondsLeft: secondsLeft(run, progress, context.now),
      firstChecked: await firstChecked(bind),
      failedStores: await failedStores(bind),
      withoutRecipient: await withoutRecipient(bind),
    };
  });
}

type RunBind = { shopId: string; runId: string };

async function storeCounts(bind: RunBind) {
  const counted = await row<{ waiting: number; built: number; rendered: number; failed: number }>(
    `select count(*) filter (where state = 'waiting')::int as waiting,
       count(*) filter (where state = 'built')::int as built,
       count(*) filter (where state = 'rendered')::int as rendered,
       count(*) filter (where state = 'failed')::int as failed
     from statement_run_stores where shop_id = $shopId and run_id = $runId`,
    bind,
  );
  return counted ?? { waiting: 0, built: 0, rendered: 0, failed: 0 };
}

async function mailCounts(bind: RunBind) {
  const counted = await row<{
    waiting: number;
    sent: number;
    uncertain: number;
    failed: number;
    total: number;
  }>(
    `select count(*) filter (where d.state in ('waiting', 'handing_over'))::int as waiting,
       count(*) filter (where d.state = 'sent')::int as sent,
       count(*) filter (where d.state = 'uncertain')::int as uncertain,
       count(*) filter (where d.state = 'failed')::int as failed,
       count(*)::int as total
     from deliveries d join statements s on s.shop_id = d.shop_id and s.id = d.statement_id
     where d.shop_id = $shopId and s.run_id = $runId`,
    bind,
  );
  return counted ?? { waiting: 0, sent: 0, uncertain: 0, failed: 0, total: 0 };
}

type Counts = Awaited<ReturnType<typeof storeCounts>>;
type Mails = Awaited<ReturnType<typeof mailCounts>>;

/** Each store takes three steps: built, rendered, mailed. */
function progressOf(run: RunRow, counts: Counts, mails: Mails): number {
  if (run.state === 'done' || run.state === 'failed') return 1;
  const stores = Math.max(1, run.stores);
  const mailed = mails.total ? (mails.total - mails.waiting) / mails.total : 0;
  const steps = counts.built + 2 * counts.rendered + 3 * counts.failed + counts.rendered * mailed;
  return Math.min(1, Math.round((steps / (3 * stores)) * 1000) / 1000);
}

function secondsLeft(run: RunRow, progress: number, now: Date): number | null {
  if (!['building', 'sending'].includes(run.state) || progress < 0.05) return null;
  const passed = (now.getTime() - run.startedAt.getTime()) / 1000;
  return Math.max(1, Math.round((passed * (1 - progress)) / progress));
}

/** The first statements of the run, proved from their own figures and against those before. */
async function firstChecked(bind: RunBind) {
  const first = await rows<{ snapshot: StoredSnapshot; previous: number | null }>(
    `select s.snapshot, (select p.closing from statements p
       where p.shop_id = s.shop_id and p.store_id = s.store_id and p.month < s.month
       order by p.month desc limit 1) as previous
     from statements s where s.shop_id = $shopId and s.run_id = $runId
     order by s.number limit 3`,
    bind,
  );
  const checks = first.flatMap(({ snapshot, previous }) =>
    checkStatement(snapshot, { closing: previous ?? 0 }),
  );
  return {
    statements: first.length,
    checks: checks.length,
    agree: checks.filter(({ holds }) => holds).length,
  };
}

interface StoreRef {
  storeId: string;
  storeName: string;
  clientId: string;
}

function failedStores(bind: RunBind): Promise<(StoreRef & { error: string })[]> {
  return rows(
    `select s.id as "storeId", s.name as "storeName", s.client_id as "clientId",
       coalesce(r.last_error, '') as error
     from statement_run_stores r join stores s on s.shop_id = r.shop_id and s.id = r.store_id
     where r.shop_id = $shopId and r.run_id = $runId and r.state = 'failed'
     order by s.name, s.id limit 50`,
    bind,
  );
}

function withoutRecipient(bind: RunBind): Promise<StoreRef[]> {
  return rows(
    `select s.id as "storeId", s.name as "storeName", s.client_id as "clientId"
     from statement_run_stores r join stores s on s.shop_id = r.shop_id and s.id = r.store_id
     where r.shop_id = $shopId and r.run_id = $runId and not exists (${recipientsOfStore})
     order by s.name, s.id limit 50`,
    bind,
  );
}
