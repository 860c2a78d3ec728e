import { record } from '../../core/audit';
import { type Context } from '../../core/context';
import { withTenant, write } from '../../core/database/tenancy';
import { enqueue } from '../../core/jobs/boss';
import { announce } from '../../core/live/live';
import { problem } from '../../core/problems/problem';
import { orStale } from '../../core/versions';
import { refusePastLimit } from '../subscription/plan-limits';
import { type Import, importColumns, type ImportRow, presentImport } from './import-row';
import { importOf } from './read-imports';

/** Hands a checked file to the worker to be applied whole. */
export function applyImport(context: Context, importId: string, version: number): Promise<Import> {
  return withTenant(context, async () => {
    const before = await importOf(context, importId);
    if (before.version === version) refuseUnready(before);
    if (before.kind !== 'parts') await refusePastLimit(context, before.kind, before.count_new);
    const now = await update(context, importId, version, "state = 'applying', rows_done = 0");
    await enqueue('import-work', { shopId: context.shopId, importId });
    await record(context, 'import: applied', { kind: 'import', id: importId });
    return now;
  });
}

/** Puts an import away. One that is being checked stops there; an applied one stays. */
export function discardImport(
  context: Context,
  importId: string,
  version: number,
): Promise<Import> {
  return withTenant(context, async () => {
    const before = await importOf(context, importId);
    if (before.state === 'applied' || before.state === 'applying') {
      throw problem('conflict', 'The file is applied: change the rows themselves.');
    }
    return update(context, importId, version, "state = 'discarded', problem = null");
  });
}

function refuseUnready(before: ImportRow): void {
  if (before.state !== 'checked') {
    throw problem('conflict', `The file is ${before.state}: only a checked one can be applied.`);
  }
  if (before.count_bad > 0) {
    const rows = before.count_bad === 1 ? '1 row is' : `${before.count_bad} rows are`;
    throw problem('conflict', `${rows} bad: put the file right and send it again.`);
  }
}

async function update(
  context: Context,
  importId: string,
  version: number,
  set: string,
): Promise<Import> {
  const changed = await orStale(
    await write<ImportRow>(
      `update imports set ${set}, lease_until = null
       where shop_id = $shopId and id = $importId and version = $version
       returning ${importColumns}`,
      { shopId: context.shopId, importId, version },
    ),
    () => importOf(context, importId),
  );
  await announce(context, 'imports', importId);
  return presentImport(changed);
}
