import { handle } from '../../core/http/route';
import { confirmRulings, overruleRulings } from './decide-rulings';
import { showRulings } from './show-rulings';
import { listWaiting } from './waiting-rulings';

export const rulingsRoutes = [
  handle('rulings.waiting', (context, { query }) => listWaiting(context, query)),
  handle('rulings.show', (context, { params }) => showRulings(context, params.visitId)),
  handle('rulings.confirm', (context, { params, body }) =>
    confirmRulings(context, params.visitId, body.lines),
  ),
  handle('rulings.overrule', (context, { params, body }) =>
    overruleRulings(context, params.visitId, body),
  ),
];
