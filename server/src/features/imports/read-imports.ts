import { type Context } from '../../core/context';
import { type Bind, row, rows, withTenant } from '../../core/database/tenancy';
import { type AnswerOf, type InputOf } from '../../core/http/route';
import { page, searched } from '../../core/lists/keyset';
import { found, invalid } from '../../core/problems/problem';
import { type Import, importColumns, type ImportRow, presentImport } from './import-row';

export function listImports(
  context: Context,
  query: InputOf<'imports.list'>['query'],
): Promise<AnswerOf<'imports.list'>> {
  return withTenant(context, () => {
    const bind: Bind = { shopId: context.shopId };
    return page<ImportRow, Import>(
      {
        select: `select ${importColumns} from imports`,
        from: 'imports',
        where: ['shop_id = $shopId', ...searched(query.q, ['file_name', 'kind'], bind)],
        bind,
        sort: { column: 'created_at', type: 'timestamptz', descending: true },
        id: 'id',
        limit: query.limit,
        cursor: query.cursor,
      },
      presentImport,
    );
  });
}

export function showImport(context: Context, importId: string): Promise<Import> {
  return withTenant(context, async () => presentImport(await importOf(context, importId)));
}

/** In a tenant transaction. */
export async function importOf(context: Context, importId: string): Promise<ImportRow> {
  return found(
    await row<ImportRow>(
      `select ${importColumns} from imports where shop_id = $shopId and id = $importId`,
      { shopId: context.shopId, importId },
    ),
  );
}

interface CheckedRow {
  row_number: number;
  outcome: AnswerOf<'imports.rows'>['items'][number]['outcome'];
  label: string;
  details: Pick<AnswerOf<'imports.rows'>['items'][number], 'errors' | 'changes'>;
}

/** The rows in the order of the file; the row number is the key, so it is the cursor too. */
export function listImportRows(
  context: Context,
  importId: string,
  query: InputOf<'imports.rows'>['query'],
): Promise<AnswerOf<'imports.rows'>> {
  return withTenant(context, async () => {
    const of = await importOf(context, importId);
    const bind: Bind = { shopId: context.shopId, importId, after: afterRow(query.cursor) };
    const where = ['shop_id = $shopId', 'import_id = $importId', 'row_number > $after'];
    if (query.outcome) {
      bind.outcome = query.outcome;
      where.push('outcome = $outcome');
    }
    const checked = await rows<CheckedRow>(
      `select row_number, outcome, label, details from import_rows
       where ${where.join(' and ')} order by row_number limit ${query.limit + 1}`,
      bind,
    );
    const items = checked.slice(0, query.limit).map((each) => ({
      row: each.row_number,
      outcome: each.outcome,
      label: each.label,
      errors: each.details.errors,
      changes: each.details.changes,
    }));
    const counts = presentImport(of).counts;
    const n = query.outcome ? counts[query.outcome] : Object.values(counts).reduce((a, b) => a + b);
    const more = checked.length > query.limit;
    return {
      items,
      next: more ? String(items.at(-1)?.row) : null,
      count: { value: n, capped: false },
    };
  });
}

function afterRow(cursor: string | undefined): number {
  if (cursor === undefined) return 0;
  if (/^\d{1,8}$/.test(cursor)) return Number(cursor);
  throw invalid([{ pointer: '/cursor', in: 'query', detail: 'is not a cursor of this list' }]);
}
