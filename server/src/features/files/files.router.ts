import { handle } from '../../core/http/route';
import { addPhoto } from './add-photo';
import { listPhotos, showPhoto } from './read-photos';

export const filesRoutes = [
  handle('files.add', (context, { body, file }) => addPhoto(context, body, file)),
  handle('files.list', (context, { query }) => listPhotos(context, query)),
  handle('files.show', (context, { params, query }) =>
    showPhoto(context, params.fileId, query.size),
  ),
];
