import { handle, RawReply } from '../../core/http/route';
import { followChanges } from '../../core/live/live';

export const liveRoutes = [
  handle('live.follow', (context) =>
    Promise.resolve(new RawReply((response) => followChanges(context, response))),
  ),
];
