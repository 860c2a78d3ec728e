import { handle } from '../../core/http/route';
import { cancelShop, changePlanOfShop, pauseShop, resumeShop } from './decide-shop';
import { decideMail, listMails } from './mails';
import { createPlan, editPlan, listAllPlans } from './plans';
import { listShops, showShop } from './read-shops';
import { listCardEvents, listPlatformAudit, showQueues } from './watch';

export const platformAreaRoutes = [
  handle('platform.shops', (_context, { query }) => listShops(query)),
  handle('platform.shop', (context, { params }) => showShop(context, params.shopId)),
  handle('platform.changePlan', (context, { params, body }) =>
    changePlanOfShop(context, params.shopId, body),
  ),
  handle('platform.pause', (context, { params, body }) =>
    pauseShop(context, params.shopId, body.note),
  ),
  handle('platform.resume', (context, { params, body }) =>
    resumeShop(context, params.shopId, body.note),
  ),
  handle('platform.cancel', (context, { params, body }) =>
    cancelShop(context, params.shopId, body.note),
  ),
  handle('platform.plans', () => listAllPlans()),
  handle('platform.createPlan', (context, { body }) => createPlan(context, body)),
  handle('platform.editPlan', (context, { params, version, body }) =>
    editPlan(context, params.planId, version, body),
  ),
  handle('platform.queues', () => showQueues()),
  handle('platform.mails', (_context, { query }) => listMails(query)),
  handle('platform.decideMail', (context, { params, body }) =>
    decideMail(context, params.mailId, body.decision),
  ),
  handle('platform.audit', (_context, { query }) => listPlatformAudit(query)),
  handle('platform.cardEvents', (_context, { query }) => listCardEvents(query)),
];
