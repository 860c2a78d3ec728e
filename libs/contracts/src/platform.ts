import { z } from 'zod';
import { deliveryState, subscriptionState } from './enums';
import { listOf, listQuery } from './lists';
import { defineOperations } from './operation';
import { plan, subscriptionEvent, usage } from './subscription';
import { id, line, words } from './text';
import { amount, currency, instant, version } from './values';

/** What the platform area knows of a shop: nothing of its business. */
export const platformShop = z.object({
  id,
  name: z.string(),
  zone: z.string(),
  currency: z.string(),
  planId: id,
  planName: z.string(),
  state: subscriptionState,
  stateSince: instant,
  stores: z.int(),
  machines: z.int(),
  crew: z.int(),
  createdAt: instant,
});

export const platformShopPage = platformShop.extend({
  /** Paused by an admin, not for want of payment. */
  pausedByPlatform: z.boolean(),
  trialEndsAt: instant.nullable(),
  graceEndsAt: instant.nullable(),
  paidUntil: instant.nullable(),
  mayWrite: z.boolean(),
  plan,
  usage: z.array(usage),
  events: z.array(subscriptionEvent),
  owners: z.array(z.object({ name: z.string(), email: z.string() })),
  /** Until when the shop lets support read its data; null: it does not. */
  consentUntil: instant.nullable(),
  version,
});

export const platformMail = z.object({
  id,
  shopId: id.nullable(),
  /** Masked: `a...@people.example`. */
  recipient: z.string(),
  template: z.string(),
  state: deliveryState,
  attempt: z.int(),
  lastError: z.string().nullable(),
  nextAttemptAt: instant,
  sentAt: instant.nullable(),
  createdAt: instant,
});

const shopParams = z.strictObject({ shopId: id });
const why = z.strictObject({ note: words(500).default('') });
const planFields = {
  name: line(60),
  monthlyAmount: amount,
  currency,
  storeLimit: z.int().min(1).max(100_000),
  machineLimit: z.int().min(1).max(1_000_000),
  crewLimit: z.int().min(1).max(10_000),
  trialDays: z.int().min(0).max(365),
  graceDays: z.int().min(0).max(90),
  offered: z.boolean(),
};

export const platformOperations = defineOperations({
  'platform.shops': {
    method: 'GET',
    path: '/api/platform/shops',
    summary: 'Shops by name or age',
    permission: 'platform.read',
    query: listQuery({
      sort: ['name', '-createdAt'],
      filters: { state: subscriptionState.optional(), planId: id.optional() },
    }),
    answer: listOf(platformShop),
  },
  'platform.shop': {
    method: 'GET',
    path: '/api/platform/shops/:shopId',
    summary: 'One shop: plan, subscription, usage, owners',
    permission: 'platform.read',
    params: shopParams,
    answer: platformShopPage,
  },
  'platform.changePlan': {
    method: 'PUT',
    path: '/api/platform/shops/:shopId/plan',
    summary: 'Put a shop on another plan',
    permission: 'platform.change',
    params: shopParams,
    body: z.strictObject({ planId: id, note: words(500).default('') }),
    answer: platformShopPage,
    problems: ['conflict', 'card-payment-failed'],
  },
  'platform.pause': {
    method: 'POST',
    path: '/api/platform/shops/:shopId/pause',
    summary: 'Pause a shop: it reads and exports everything and writes nothing',
    permission: 'platform.change',
    idempotency: 'natural',
    params: shopParams,
    body: why,
    answer: platformShopPage,
    status: 200,
    problems: ['conflict', 'card-payment-failed'],
  },
  'platform.resume': {
    method: 'POST',
    path: '/api/platform/shops/:shopId/resume',
    summary: 'Let a paused shop write again',
    permission: 'platform.change',
    idempotency: 'natural',
    params: shopParams,
    body: why,
    answer: platformShopPage,
    status: 200,
    problems: ['conflict', 'card-payment-failed'],
  },
  'platform.cancel': {
    method: 'POST',
    path: '/api/platform/shops/:shopId/cancel',
    summary: 'End a shop’s subscription: it can still read and export everything',
    permission: 'platform.change',
    idempotency: 'natural',
    params: shopParams,
    body: why,
    answer: platformShopPage,
    status: 200,
    problems: ['conflict', 'card-payment-failed'],
  },
  'platform.plans': {
    method: 'GET',
    path: '/api/platform/plans',
    summary: 'All plans, with how many shops are on each',
    permission: 'platform.read',
    answer: z.object({ items: z.array(plan.extend({ shops: z.int() })) }),
  },
  'platform.createPlan': {
    method: 'POST',
    path: '/api/platform/plans',
    summary: 'Add a plan; its code is its own for good',
    permission: 'platform.change',
    idempotency: 'natural',
    body: z.strictObject({
      code: z
        .string()
        .regex(/^[a-z][a-z0-9-]{1,39}$/, { error: 'is lower-case letters, digits, -' }),
      ...planFields,
    }),
    answer: plan,
    problems: ['conflict'],
  },
  'platform.editPlan': {
    method: 'PATCH',
    path: '/api/platform/plans/:planId',
    summary: 'Change a plan; a new price holds for who chooses it from now on',
    permission: 'platform.change',
    params: z.strictObject({ planId: id }),
    ifMatch: true,
    body: z.strictObject(planFields).partial(),
    answer: plan,
  },
  'platform.queues': {
    method: 'GET',
    path: '/api/platform/queues',
    summary: 'The job queues: how much waits, is worked, failed',
    permission: 'platform.read',
    answer: z.object({
      items: z.array(
        z.object({
          queue: z.string(),
          waiting: z.int(),
          active: z.int(),
          /** In the last day. */
          failed: z.int(),
          /** When the job that waits longest was to begin; null: none waits. */
          oldestWaitingAt: instant.nullable(),
        }),
      ),
    }),
  },
  'platform.mails': {
    method: 'GET',
    path: '/api/platform/mails',
    summary: 'Mails of sign-in and the platform, newest first',
    permission: 'platform.read',
    query: listQuery({ sort: ['-createdAt'], filters: { state: deliveryState.optional() } }),
    answer: listOf(platformMail),
  },
  'platform.decideMail': {
    method: 'POST',
    path: '/api/platform/mails/:mailId/decide',
    summary: 'Settle a mail whose answer was lost, or send a failed one again',
    permission: 'platform.change',
    idempotency: 'natural',
    params: z.strictObject({ mailId: id }),
    body: z.strictObject({ decision: z.enum(['arrived', 'send_again']) }),
    answer: platformMail,
    status: 200,
    problems: ['conflict'],
  },
  'platform.audit': {
    method: 'GET',
    path: '/api/platform/audit',
    summary: 'Who did what in the platform area, newest first',
    permission: 'platform.read',
    query: listQuery({ sort: ['-at'], filters: { shopId: id.optional() } }),
    answer: listOf(
      z.object({
        id,
        at: instant,
        byName: z.string().nullable(),
        what: z.string(),
        shopId: id.nullable(),
        shopName: z.string().nullable(),
        details: z.record(z.string(), z.unknown()),
      }),
    ),
  },
  'platform.cardEvents': {
    method: 'GET',
    path: '/api/platform/card-events',
    summary: 'Events of the card payment service, newest first',
    permission: 'platform.read',
    query: listQuery({
      sort: ['-receivedAt'],
      filters: { state: z.enum(['waiting', 'worked']).optional() },
    }),
    answer: listOf(
      z.object({
        id: z.string(),
        type: z.string(),
        account: z.string().nullable(),
        receivedAt: instant,
        workedAt: instant.nullable(),
        attempts: z.int(),
        lastError: z.string().nullable(),
      }),
    ),
  },
});
