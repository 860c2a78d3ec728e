import { config } from '../../core/config';
import { type Context } from '../../core/context';
import { createLog } from '../../core/logging';
import { buildStatements } from './build-statements';
import { renderStatements } from './render-statements';

/**
 * Builds and renders all of a run here and now, without waiting for the worker; its mails are left
 * in line. For programs that close many months one after the other, as the demo does.
 */
export async function finishRun(context: Context, runId: string): Promise<void> {
  const log = createLog('warn', 'month-close');
  while (await buildStatements(context, runId, log));
  await renderStatements(context, runId, config(), log);
}
