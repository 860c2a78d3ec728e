import { z } from 'zod';
import { subscriptionState } from './enums';
import { listOf, listQuery } from './lists';
import { defineOperations } from './operation';
import { id } from './text';
import { instant, version } from './values';

/** What a shop can choose to pay the platform for. */
export const plan = z.object({
  id,
  code: z.string(),
  name: z.string(),
  monthlyAmount: z.int(),
  currency: z.string(),
  storeLimit: z.int(),
  machineLimit: z.int(),
  crewLimit: z.int(),
  trialDays: z.int(),
  graceDays: z.int(),
  offered: z.boolean(),
  version,
});

/** How much of a plan is used, and what is to be said of it. */
export const usage = z.object({
  kind: z.enum(['stores', 'machines', 'crew']),
  used: z.int(),
  limit: z.int(),
  level: z.enum(['within', 'near', 'at']),
  /** In plain words, to be shown as they are. */
  words: z.string(),
});

export const subscriptionEvent = z.object({
  id,
  at: instant,
  event: z.string(),
  fromState: subscriptionState.nullable(),
  toState: subscriptionState.nullable(),
  note: z.string(),
});

export const subscription = z.object({
  state: subscriptionState,
  stateSince: instant,
  /** Paused by a platform admin: paying does not open the shop, only an admin does. */
  pausedByPlatform: z.boolean(),
  trialEndsAt: instant.nullable(),
  /** While past due: until when the shop may still write. */
  graceEndsAt: instant.nullable(),
  /** Until when is paid; null while nothing is. */
  paidUntil: instant.nullable(),
  mayWrite: z.boolean(),
  plan,
  usage: z.array(usage),
  /** The newest first, at most 20. */
  events: z.array(subscriptionEvent),
  version,
});

export const consent = z.object({
  id,
  givenByName: z.string(),
  until: instant,
  createdAt: instant,
  withdrawnAt: instant.nullable(),
  /** Whether it lets support in now. */
  inForce: z.boolean(),
});

export const auditRow = z.object({
  id,
  at: instant,
  byName: z.string().nullable(),
  what: z.string(),
  subjectKind: z.string().nullable(),
  subjectId: id.nullable(),
  details: z.record(z.string(), z.unknown()),
});

export const subscriptionOperations = defineOperations({
  'subscription.show': {
    method: 'GET',
    path: '/api/subscription',
    summary: "The shop's plan, what it uses of it, and how its subscription stands",
    permission: 'subscription.read',
    answer: subscription,
  },
  'subscription.plans': {
    method: 'GET',
    path: '/api/plans',
    summary: 'The plans on offer',
    permission: 'subscription.read',
    answer: z.object({ items: z.array(plan) }),
  },
  'subscription.choose': {
    method: 'POST',
    path: '/api/subscription/plan',
    summary: 'Choose a plan: a card page to pay on first, a plain change afterwards',
    permission: 'subscription.change',
    idempotency: 'natural',
    whilePaused: true,
    body: z.strictObject({ planId: id }),
    /**
     * With `url` the browser goes there to give a card, and comes back to `/shop/subscription`
     * (`?cancelled=1` when the person turned back). Without, the plan is changed.
     */
    answer: z.object({ url: z.string().nullable(), subscription }),
    status: 200,
    problems: ['conflict', 'card-payment-failed'],
  },
  'subscription.check': {
    method: 'POST',
    path: '/api/subscription/check',
    summary:
      'Ask the card payment service how the subscription stands, without waiting for its word',
    permission: 'subscription.change',
    idempotency: 'natural',
    whilePaused: true,
    answer: subscription,
    status: 200,
    problems: ['card-payment-failed'],
  },
  'consents.list': {
    method: 'GET',
    path: '/api/consents',
    summary: 'When the shop let the platform’s support read its data',
    permission: 'subscription.read',
    answer: z.object({ items: z.array(consent) }),
  },
  'consents.give': {
    method: 'POST',
    path: '/api/consents',
    summary: "Let the platform's support read the shop's data for some hours",
    permission: 'subscription.change',
    whilePaused: true,
    body: z.strictObject({ hours: z.int().min(1).max(168) }),
    answer: consent,
  },
  'consents.withdraw': {
    method: 'POST',
    path: '/api/consents/:consentId/withdraw',
    summary: 'Take a consent back at once',
    permission: 'subscription.change',
    whilePaused: true,
    params: z.strictObject({ consentId: id }),
    answer: consent,
    status: 200,
  },
  'audit.list': {
    method: 'GET',
    path: '/api/audit',
    summary: 'Who did what in the shop, newest first',
    permission: 'audit.read',
    query: listQuery({ sort: ['-at'] }),
    answer: listOf(auditRow),
  },
});
