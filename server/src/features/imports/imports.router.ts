import { csvRow, csvStart } from '@lib/domain';
import { handle, RawReply } from '../../core/http/route';
import { importedColumns, type ListKind } from './columns';
import { applyImport, discardImport } from './decide-import';
import { listImportRows, listImports, showImport } from './read-imports';
import { startImport } from './start-import';

export const importsRoutes = [
  handle('imports.start', (context, { body, file }) => startImport(context, body, file)),
  handle('imports.list', (context, { query }) => listImports(context, query)),
  handle('imports.show', (context, { params }) => showImport(context, params.importId)),
  handle('imports.rows', (context, { params, query }) =>
    listImportRows(context, params.importId, query),
  ),
  handle('imports.apply', (context, { params, version }) =>
    applyImport(context, params.importId, version),
  ),
  handle('imports.discard', (context, { params, version }) =>
    discardImport(context, params.importId, version),
  ),
  handle('imports.template', (_context, { params }) => Promise.resolve(template(params.kind))),
];

/** The columns of a kind and one example row, to be written over. */
function template(kind: ListKind): RawReply {
  const columns = importedColumns(kind);
  const text =
    csvStart + csvRow(columns.map((c) => c.header)) + csvRow(columns.map((c) => c.example));
  return new RawReply((response) => {
    response
      .status(200)
      .set('Content-Disposition', `attachment; filename="${kind}-template.csv"`)
      .type('text/csv; charset=utf-8')
      .send(text);
  });
}
