import { type Context } from '../../core/context';
import { write } from '../../core/database/tenancy';

/** Tries before a store's statement is given up and shown. */
export const mostTries = 3;

export interface StoreFailure {
  storeId: string;
  error: unknown;
}

/**
 * Notes which stores of a run could not be stated, and why. Inside a tenant transaction. Figures
 * that do not add up will not by trying again; anything else is tried until it was often enough.
 */
export async function noteFailures(
  context: Context,
  runId: string,
  failures: readonly StoreFailure[],
): Promise<void> {
  if (failures.length === 0) return;
  await write(
    `update statement_run_stores r set attempt = r.attempt + 1, last_error = f.words,
       state = case when f.for_good or r.attempt + 1 >= ${mostTries} then 'failed' else r.state end
     from jsonb_to_recordset($failures::jsonb) as f (store_id uuid, words text, for_good boolean)
     where r.shop_id = $shopId and r.run_id = $runId and r.store_id = f.store_id
       and r.state = 'waiting'`,
    {
      shopId: context.shopId,
      runId,
      failures: JSON.stringify(
        failures.map(({ storeId, error }) => ({
          store_id: storeId,
          words: wordsOf(error),
          for_good: error instanceof RangeError,
        })),
      ),
    },
  );
}

/** What an error says, as short as the column keeps it. */
export function wordsOf(error: unknown): string {
  return (error instanceof Error ? error.message : String(error)).slice(0, 300);
}
