import { record } from '../../core/audit';
import { type Context } from '../../core/context';
import { row, withTenant, write } from '../../core/database/tenancy';
import { type AnswerOf } from '../../core/http/route';
import { announce } from '../../core/live/live';
import { found, problem } from '../../core/problems/problem';
import { moveRun } from './move-run';
import { showRun } from './read-runs';

/** Stops a close where it is: what is built stays, nothing more is built or mailed. */
export function holdRun(context: Context, runId: string): Promise<AnswerOf<'statements.hold'>> {
  return withTenant(context, async () => {
    const state = await lockRun(context, runId);
    if (state !== 'building' && state !== 'sending') {
      throw problem('conflict', 'Only a close that is running can be held.');
    }
    await write(
      `update statement_runs set state = 'held' where shop_id = $shopId and id = $runId`,
      { shopId: context.shopId, runId },
    );
    await record(context, 'month close held', { kind: 'statement_run', id: runId });
    await announce(context, 'statement-run', runId);
    return showRun(context, runId);
  });
}

/** Goes on with a close that was held, or tries the stores again that failed. */
export function goOnWithRun(context: Context, runId: string): Promise<AnswerOf<'statements.goOn'>> {
  return withTenant(context, async () => {
    const bind = { shopId: context.shopId, runId };
    const state = await lockRun(context, runId);
    if (state !== 'held' && state !== 'failed') {
      throw problem('conflict', 'Only a close that is held or failed can be gone on with.');
    }
    await write(
      `update statement_run_stores set attempt = 0, lease_until = null,
         state = case when statement_id is null then 'waiting' else 'built' end
       where shop_id = $shopId and run_id = $runId and state = 'failed'`,
      bind,
    );
    await write(
      `update statement_runs set state = 'building', problem = null, finished_at = null
       where shop_id = $shopId and id = $runId`,
      bind,
    );
    await record(context, 'month close gone on with', { kind: 'statement_run', id: runId });
    await moveRun(context, runId, ['build', 'render', 'send']);
    return showRun(context, runId);
  });
}

async function lockRun(context: Context, runId: string): Promise<string> {
  const run = await row<{ state: string }>(
    'select state from statement_runs where shop_id = $shopId and id = $runId for update',
    { shopId: context.shopId, runId },
  );
  return found(run).state;
}
