import { handle } from '../../core/http/route';
import { closeMonth } from './close-month';
import { previewClose } from './close-preview';
import { mailStatement } from './mail-statement';
import { listRuns, showRun } from './read-runs';
import { listStatements, showStatement, statementFile } from './read-statements';
import { goOnWithRun, holdRun } from './steer-run';

export const statementsRoutes = [
  handle('statements.closePreview', (context, { query }) => previewClose(context, query.month)),
  handle('statements.close', async (context, { body }) =>
    showRun(context, await closeMonth(context, body.month)),
  ),
  handle('statements.runs', (context, { query }) => listRuns(context, query)),
  handle('statements.run', (context, { params }) => showRun(context, params.runId)),
  handle('statements.hold', (context, { params }) => holdRun(context, params.runId)),
  handle('statements.goOn', (context, { params }) => goOnWithRun(context, params.runId)),
  handle('statements.list', (context, { query }) => listStatements(context, query)),
  handle('statements.show', (context, { params }) => showStatement(context, params.statementId)),
  handle('statements.pdf', (context, { params }) => statementFile(context, params.statementId)),
  handle('statements.mail', (context, { params }) => mailStatement(context, params.statementId)),
];
