import { type Context } from '../../core/context';
import { row, withTenant, write } from '../../core/database/tenancy';
import { enqueue } from '../../core/jobs/boss';
import { announce } from '../../core/live/live';

export type RunStep = 'build' | 'render' | 'send';

interface RunCounts {
  state: string;
  waiting: number;
  built: number;
  failed: number;
  unsent: boolean;
}

/**
 * Looks how far a run is, writes its state down, and wakes those of `steps` for which there is work
 * left. What is to be done stands in the rows; a wake-up too many finds nothing to do.
 */
export function moveRun(context: Context, runId: string, steps: readonly RunStep[]): Promise<void> {
  return withTenant(context, async () => {
    const bind = { shopId: context.shopId, runId };
    const run = await row<{ state: string }>(
      'select state from statement_runs where shop_id = $shopId and id = $runId for update',
      bind,
    );
    if (!run || run.state === 'held') return;
    const counts = await countRun(bind);
    const next = stateOf(counts);
    if (next.state !== run.state) {
      await write(
        `update statement_runs set state = $state, problem = $problem,
           finished_at = case when $ended then $now::timestamptz end
         where shop_id = $shopId and id = $runId`,
        { ...bind, ...next, now: context.now },
      );
    }
    await announce(context, 'statement-run', runId);
    if (steps.includes('build') && counts.waiting > 0) await enqueue('statements-build', bind);
    if (steps.includes('render') && counts.built > 0) await enqueue('statements-render', bind);
    if (steps.includes('send') && counts.unsent) {
      await enqueue('deliveries-send', { shopId: context.shopId });
    }
  });
}

async function countRun(bind: { shopId: string; runId: string }): Promise<RunCounts> {
  const counts = await row<RunCounts>(
    `select
       count(*) filter (where s.state = 'waiting')::int as waiting,
       count(*) filter (where s.state = 'built')::int as built,
       count(*) filter (where s.state = 'failed')::int as failed,
       exists (select 1 from deliveries d join statements t
          on t.shop_id = d.shop_id and t.id = d.statement_id
        where d.shop_id = $shopId and t.run_id = $runId
          and d.state in ('waiting', 'handing_over')) as unsent
     from statement_run_stores s where s.shop_id = $shopId and s.run_id = $runId`,
    bind,
  );
  return counts as RunCounts;
}

function stateOf({ waiting, built, failed, unsent }: RunCounts) {
  if (waiting + built > 0) return { state: 'building', problem: null, ended: false };
  if (unsent) return { state: 'sending', problem: null, ended: false };
  if (failed === 0) return { state: 'done', problem: null, ended: true };
  const words = failed === 1 ? 'One statement' : `${failed} statements`;
  return { state: 'failed', problem: `${words} could not be made.`, ended: true };
}
