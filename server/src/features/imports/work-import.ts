import { type Context, systemContext } from '../../core/context';
import { rows, withTenant, write } from '../../core/database/tenancy';
import { files } from '../../core/files/file-store';
import { enqueue } from '../../core/jobs/boss';
import { record } from '../../core/audit';
import { Problem } from '../../core/problems/problem';
import { countUsage, refusePastLimit } from '../subscription/plan-limits';
import { claimImport, failImport, releaseImport, updateClaimed } from './claim';
import { columnsOf } from './columns';
import { decodeText } from './decode';
import { FileRefused } from './file-refused';
import { type ImportRow } from './import-row';
import { planDigest } from './plan-digest';
import { type PlannedRow, type Planner } from './planned-row';
import { planners } from './planners';
import { readTable, type TableRow } from './read-table';

const chunk = 500;

/** What the worker does when the queue rings: checks or applies one import, whichever is due. */
export async function workImport(shopId: string, importId: string, now: Date): Promise<void> {
  const context = systemContext(shopId, now);
  const claimed = await claimImport(context, importId);
  if (!claimed) return;
  try {
    const content = await files().get(shopId, claimed.sha256);
    const table = readTable(decodeText(content), columnsOf[claimed.kind]);
    if (claimed.state === 'checking') await check(context, claimed, table);
    else await apply(context, claimed, table);
  } catch (error) {
    if (error instanceof FileRefused || error instanceof Problem) {
      await failImport(context, claimed, error.message);
      return;
    }
    await releaseImport(context, claimed);
    throw error;
  }
}

/** Plans every row and writes down what it would do, a chunk at a time; changes nothing else. */
async function check(context: Context, claimed: ImportRow, table: TableRow[]): Promise<void> {
  const planner = await withTenant(context, async () => {
    await write('delete from import_rows where shop_id = $shopId and import_id = $importId', {
      shopId: context.shopId,
      importId: claimed.id,
    });
    await updateClaimed(context, claimed, 'rows_total = $total, rows_done = 0', {
      total: table.length,
    });
    return planners[claimed.kind](context, table);
  });
  const digest = planDigest();
  const counts = { new: 0, changed: 0, unchanged: 0, bad: 0 };
  for (let start = 0; start < table.length; start += chunk) {
    const planned = table.slice(start, start + chunk).map((row) => planner.plan(row));
    for (const row of planned) {
      digest.add(row);
      counts[row.outcome]++;
    }
    const held = await withTenant(context, () =>
      keepRows(context, claimed, planned, start + planned.length, counts),
    );
    if (!held) return;
  }
  await withTenant(context, () =>
    updateClaimed(context, claimed, "state = 'checked', plan_sha256 = $digest", {
      digest: digest.value(),
    }),
  );
}

async function keepRows(
  context: Context,
  claimed: ImportRow,
  planned: PlannedRow[],
  done: number,
  counts: Record<PlannedRow['outcome'], number>,
): Promise<boolean> {
  const held = await updateClaimed(
    context,
    claimed,
    `rows_done = $done, count_new = $new, count_changed = $changed,
     count_unchanged = $unchanged, count_bad = $bad`,
    { done, ...counts },
  );
  if (!held) return false;
  await write(
    `insert into import_rows (shop_id, import_id, row_number, outcome, label, details)
     select $shopId, $importId, x.row, x.outcome, x.label,
       jsonb_build_object('errors', x.errors, 'changes', x.changes)
     from jsonb_to_recordset($rows::jsonb)
       as x(row integer, outcome text, label text, errors jsonb, changes jsonb)`,
    { shopId: context.shopId, importId: claimed.id, rows: JSON.stringify(planned) },
  );
  return true;
}

const changedMeanwhile =
  'Something these rows are about was changed since they were checked: send the file again.';

/** Writes every row in one transaction, or none. */
async function apply(context: Context, claimed: ImportRow, table: TableRow[]): Promise<void> {
  await withTenant(context, async () => {
    const held = await updateClaimed(context, claimed, "state = 'applied', rows_done = $done", {
      done: table.length,
    });
    if (!held) return;
    // Nobody numbers or adds beside it: two imports of one shop take turns.
    await rows('select pg_advisory_xact_lock(hashtextextended($shopId::text, 7240))', {
      shopId: context.shopId,
    });
    const planner = await planners[claimed.kind](context, table);
    refuseOtherPlan(planner, claimed, table);
    const added = planner.added();
    if (added.stores) await refusePastLimit(context, 'stores', added.stores);
    if (added.machines) await refusePastLimit(context, 'machines', added.machines);
    await planner.write();
    await countUsage(context);
    await record(context, 'import: rows written', { kind: 'import', id: claimed.id }, added);
  });
}

function refuseOtherPlan(planner: Planner, claimed: ImportRow, table: TableRow[]): void {
  const digest = planDigest();
  for (const row of table) digest.add(planner.plan(row));
  if (digest.value() !== claimed.plan_sha256) throw new FileRefused(changedMeanwhile);
}

/** For the sweep: imports of a shop whose worker died, or whose waking was lost. */
export function sweepImports(context: Context): Promise<void> {
  return withTenant(context, async () => {
    const open = await rows<{ id: string }>(
      `select id from imports where shop_id = $shopId
         and state in ('waiting', 'checking', 'applying')
         and coalesce(lease_until, updated_at + interval '1 minute') < $now limit 100`,
      { shopId: context.shopId, now: context.now },
    );
    for (const { id } of open) {
      await enqueue(
        'import-work',
        { shopId: context.shopId, importId: id },
        { singletonKey: `import ${id}` },
      );
    }
  });
}
