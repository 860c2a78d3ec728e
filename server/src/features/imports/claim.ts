import { type Context } from '../../core/context';
import { withTenant, write } from '../../core/database/tenancy';
import { announce } from '../../core/live/live';
import { importColumns, type ImportRow } from './import-row';

/** How long a worker may say nothing before another takes its import over. */
const leaseSeconds = 120;
/** After so many workers died over it, somebody has to look at the file. */
const mostAttempts = 6;

/**
 * Takes the import for this worker, or nothing when there is nothing to do or another holds it.
 * Every later write of this worker names the attempt, so one that was taken for dead and comes back
 * matches no row.
 */
export function claimImport(context: Context, importId: string): Promise<ImportRow | undefined> {
  return withTenant(context, async () => {
    const [claimed] = await write<ImportRow>(
      `update imports set attempt = attempt + 1,
         lease_until = now() + make_interval(secs => ${leaseSeconds}),
         state = case state when 'waiting' then 'checking' else state end
       where shop_id = $shopId and id = $importId
         and state in ('waiting', 'checking', 'applying')
         and (lease_until is null or lease_until < now())
       returning ${importColumns}`,
      { shopId: context.shopId, importId },
    );
    if (claimed && claimed.attempt > mostAttempts) {
      await failImport(context, claimed, 'The file could not be worked: tell us about it.');
      return undefined;
    }
    return claimed;
  });
}

/** Whether this worker still holds the import; renews its lease and writes what is given. */
export async function updateClaimed(
  context: Context,
  claimed: ImportRow,
  set: string,
  bind: Record<string, unknown> = {},
): Promise<boolean> {
  const updated = await write(
    `update imports set ${set}, lease_until = now() + make_interval(secs => ${leaseSeconds})
     where shop_id = $shopId and id = $importId and attempt = $attempt and state = $state
     returning id`,
    {
      ...bind,
      shopId: context.shopId,
      importId: claimed.id,
      attempt: claimed.attempt,
      state: claimed.state,
    },
  );
  if (updated.length) await announce(context, 'imports', claimed.id);
  return updated.length > 0;
}

export function failImport(context: Context, claimed: ImportRow, words: string): Promise<boolean> {
  return withTenant(context, () =>
    updateClaimed(context, claimed, "state = 'failed', problem = $words", { words }),
  );
}

/** Lets go of an import that a passing trouble stopped, so that the next try need not wait. */
export async function releaseImport(context: Context, claimed: ImportRow): Promise<void> {
  await withTenant(context, () =>
    write(
      `update imports set lease_until = null
       where shop_id = $shopId and id = $importId and attempt = $attempt`,
      { shopId: context.shopId, importId: claimed.id, attempt: claimed.attempt },
    ),
  );
}
