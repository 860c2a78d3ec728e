import { v7 as uuid } from 'uuid';
import { record } from '../../core/audit';
import { type Context } from '../../core/context';
import { row, withTenant, write } from '../../core/database/tenancy';
import { cleanFileName } from '../../core/files/file-name';
import { files } from '../../core/files/file-store';
import { type InputOf } from '../../core/http/route';
import { enqueue } from '../../core/jobs/boss';
import { announce } from '../../core/live/live';
import { invalid, problem } from '../../core/problems/problem';
import { columnsOf, type ListKind } from './columns';
import { decodeText } from './decode';
import { FileRefused } from './file-refused';
import { type Import, importColumns, type ImportRow, presentImport } from './import-row';
import { delimiterOf, readHeader } from './read-table';

/**
 * Takes a file: its header is looked at right away, its rows are checked by the worker. The bytes
 * rest under their hash, so what is applied later is what was checked.
 */
export async function startImport(
  context: Context,
  body: InputOf<'imports.start'>['body'],
  file: { name: string; content: Buffer } | undefined,
): Promise<Import> {
  if (!file) throw invalid([{ pointer: '/file', detail: 'is missing' }]);
  refuseWrongHeader(body.kind, file.content);
  const sha256 = await files().put(context.shopId, file.content);
  return withTenant(context, async () => {
    const id = body.id ?? uuid();
    const bind = { shopId: context.shopId, id, kind: body.kind, sha256 };
    const [added] = await write<ImportRow>(
      `insert into imports (shop_id, id, kind, file_name, sha256, state, by_user_id)
       values ($shopId, $id, $kind, $fileName, $sha256, 'waiting', $userId)
       on conflict (shop_id, id) do nothing returning ${importColumns}`,
      { ...bind, fileName: cleanFileName(file.name), userId: context.userId },
    );
    if (!added) {
      const first = await row<ImportRow>(
        `select ${importColumns} from imports
         where shop_id = $shopId and id = $id and kind = $kind and sha256 = $sha256`,
        bind,
      );
      if (!first) throw problem('conflict', 'Another file has this id.');
      return presentImport(first);
    }
    await enqueue('import-work', { shopId: context.shopId, importId: id });
    await record(context, 'import: file sent', { kind: 'import', id }, { kind: body.kind });
    await announce(context, 'imports', id);
    return presentImport(added);
  });
}

function refuseWrongHeader(kind: ListKind, content: Buffer): void {
  try {
    const text = decodeText(content);
    const columns = columnsOf[kind];
    readHeader(text, delimiterOf(text, columns), columns);
  } catch (error) {
    if (error instanceof FileRefused) throw invalid([{ pointer: '/file', detail: error.message }]);
    throw error;
  }
}
