import { handle } from '../../core/http/route';
import {
  changePart,
  createPart,
  endPart,
  listCategories,
  listParts,
  resumePart,
  showPart,
} from './parts';

export const partsRoutes = [
  handle('parts.list', (context, { query }) => listParts(context, query)),
  handle('parts.categories', (context) => listCategories(context)),
  handle('parts.show', (context, { params }) => showPart(context, params.partId)),
  handle('parts.create', (context, { body }) => createPart(context, body)),
  handle('parts.change', (context, { params, version, body }) =>
    changePart(context, params.partId, version, body),
  ),
  handle('parts.end', (context, { params, version }) => endPart(context, params.partId, version)),
  handle('parts.resume', (context, { params, version }) =>
    resumePart(context, params.partId, version),
  ),
];
