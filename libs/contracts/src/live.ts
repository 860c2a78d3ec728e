import { defineOperations } from './operation';

export const liveOperations = defineOperations({
  'live.follow': {
    method: 'GET',
    path: '/api/live',
    summary: 'What changes in the shop, as it changes (Server-Sent Events); ids only',
    permission: 'live.follow',
    answerType: 'text/event-stream',
  },
});
