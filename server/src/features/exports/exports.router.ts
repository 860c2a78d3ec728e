import { handle } from '../../core/http/route';
import { exportList } from './export-list';

export const exportsRoutes = [
  handle('exports.download', (context, { params, query }) =>
    exportList(context, params.kind, query.show),
  ),
];
