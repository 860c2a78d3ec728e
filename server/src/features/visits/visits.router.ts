import { handle } from '../../core/http/route';
import { listActs, recordActs } from './acts/record-acts';
import { causeCandidates } from './cause-candidates';
import { cancelVisit, changeVisit, confirmVisit } from './change-visit';
import { showDaySheet } from './day-sheet';
import { machineHistory } from './machine-history';
import { planVisit } from './plan-visit';
import { listVisits, showVisit } from './read-visits';
import { ownDay, showSheet } from './visit-sheets';

export const visitsRoutes = [
  handle('visits.list', (context, { query }) => listVisits(context, query)),
  handle('visits.show', (context, { params }) => showVisit(context, params.visitId)),
  handle('visits.plan', (context, { body }) => planVisit(context, body)),
  handle('visits.change', (context, { params, version, body }) =>
    changeVisit(context, params.visitId, version, body),
  ),
  handle('visits.confirm', (context, { params, version }) =>
    confirmVisit(context, params.visitId, version),
  ),
  handle('visits.cancel', (context, { params, version, body }) =>
    cancelVisit(context, params.visitId, version, body.words),
  ),
  handle('visits.daySheet', (context, { query }) => showDaySheet(context, query.on)),
  handle('visits.day', (context, { query }) => ownDay(context, query.on)),
  handle('visits.sheet', (context, { params }) => showSheet(context, params.visitId)),
  handle('acts.record', (context, { params, body }) =>
    recordActs(context, params.visitId, body.acts),
  ),
  handle('acts.list', (context, { params }) => listActs(context, params.visitId)),
  handle('machines.history', (context, { params, query }) =>
    machineHistory(context, params.machineId, query),
  ),
  handle('jobs.causeCandidates', (context, { params }) => causeCandidates(context, params.jobId)),
];
