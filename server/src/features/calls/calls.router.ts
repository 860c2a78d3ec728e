import { handle } from '../../core/http/route';
import { changeCall, withdrawCall } from './change-call';
import { listCalls, showCall } from './read-calls';
import { reportCall } from './report-call';

export const callsRoutes = [
  handle('calls.list', (context, { query }) => listCalls(context, query)),
  handle('calls.show', (context, { params }) => showCall(context, params.callId)),
  handle('calls.report', (context, { body }) => reportCall(context, body)),
  handle('calls.change', (context, { params, version, body }) =>
    changeCall(context, params.callId, version, body),
  ),
  handle('calls.withdraw', (context, { params, version, body }) =>
    withdrawCall(context, params.callId, version, body.words),
  ),
];
