import { handle } from '../../core/http/route';
import { choosePlan } from './choose-plan';
import { giveConsent, listConsents, withdrawConsent } from './consents';
import { askAfterPayment } from './follow-card-subscription';
import { listAudit } from './list-audit';
import { listPlans, showSubscription } from './show-subscription';

export const subscriptionRoutes = [
  handle('subscription.show', (context) => showSubscription(context)),
  handle('subscription.plans', (context) => listPlans(context)),
  handle('subscription.choose', (context, { body }) => choosePlan(context, body.planId)),
  handle('subscription.check', async (context) => {
    await askAfterPayment(context.shopId, context.now);
    return showSubscription(context);
  }),
  handle('consents.list', (context) => listConsents(context)),
  handle('consents.give', (context, { body }) => giveConsent(context, body.hours)),
  handle('consents.withdraw', (context, { params }) => withdrawConsent(context, params.consentId)),
  handle('audit.list', (context, { query }) => listAudit(context, query)),
];
