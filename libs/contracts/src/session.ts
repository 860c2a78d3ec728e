import { z } from 'zod';
import { defineOperations } from './operation';
import { permissions, roles } from './permissions';
import { email, id, line, password, token } from './text';
import { currency, instant, locale, zone } from './values';

const oneTimeCode = z.string().regex(/^\d{6}$/, { error: 'is six digits' });
/** What proves a sign-in beside the password: a one-time code, or a recovery code as people type it. */
const proof = z.string().regex(/^\s{0,4}(\d{6}|[0-9A-Za-z]{5}[\s-]?[0-9A-Za-z]{5})\s{0,4}$/, {
  error: 'is neither six digits nor a recovery code',
});
/** Shown this once: the server keeps nothing it could show them from again. */
const recoveryCodes = z.object({ recoveryCodes: z.array(z.string()) });

export const membership = z.object({
  id,
  role: z.enum(roles),
  shopId: id.nullable(),
  shopName: z.string().nullable(),
  clientId: id.nullable(),
  clientName: z.string().nullable(),
  storeId: id.nullable(),
});

export const session = z.object({
  accessToken: z.string(),
  expiresAt: instant,
  person: z.object({ id, name: z.string(), email: z.string(), emailVerified: z.boolean() }),
  membership: membership.nullable(),
  memberships: z.array(membership),
  permissions: z.array(z.enum(Object.keys(permissions) as [keyof typeof permissions])),
  /** Of the shop the person works with now; the platform area has none. */
  shop: z
    .object({
      name: z.string(),
      currency: z.string(),
      zone: z.string(),
      locale: z.string(),
      subscriptionState: z.string(),
      mayWrite: z.boolean(),
    })
    .nullable(),
});

export const device = z.object({
  id,
  startedAt: instant,
  lastUsedAt: instant,
  device: z.string(),
  current: z.boolean(),
});

export const sessionOperations = defineOperations({
  'session.signIn': {
    method: 'POST',
    path: '/api/session',
    summary: 'Sign in with e-mail address and password',
    permission: 'public',
    body: z.strictObject({
      email,
      password: z.string().min(1).max(128),
      code: proof.optional(),
    }),
    answer: session,
    status: 200,
    problems: ['sign-in-refused', 'code-required', 'too-many-requests'],
  },
  'session.refresh': {
    method: 'POST',
    path: '/api/session/refresh',
    summary: 'Trade the refresh cookie for a new access token',
    permission: 'public',
    answer: session,
    status: 200,
    problems: ['not-signed-in'],
  },
  'session.switch': {
    method: 'POST',
    path: '/api/session/membership',
    summary: 'Go on as another of your memberships',
    permission: 'signed-in',
    body: z.strictObject({ membershipId: id }),
    answer: session,
    status: 200,
    idempotency: 'natural',
    problems: ['not-found'],
  },
  'session.signOut': {
    method: 'DELETE',
    path: '/api/session',
    summary: 'Sign out on this device',
    permission: 'public',
  },
  'session.list': {
    method: 'GET',
    path: '/api/sessions',
    summary: 'Where you are signed in',
    permission: 'signed-in',
    answer: z.object({ items: z.array(device) }),
  },
  'session.end': {
    method: 'DELETE',
    path: '/api/sessions/:sessionId',
    summary: 'Sign out on one device',
    permission: 'signed-in',
    params: z.strictObject({ sessionId: id }),
  },
  'session.signOutEverywhere': {
    method: 'DELETE',
    path: '/api/sessions',
    summary: 'Sign out on every device',
    permission: 'signed-in',
  },
});

export const accountOperations = defineOperations({
  'shops.signUp': {
    method: 'POST',
    path: '/api/sign-up',
    summary: 'Open a shop with a trial plan',
    permission: 'public',
    body: z.strictObject({
      shopName: line(120),
      name: line(120),
      email,
      password,
      zone,
      currency,
      locale: locale.default('en-US'),
    }),
    // The same answer whether the address is known or not; the mail tells the rest.
    answer: z.object({ message: z.string() }),
    status: 202,
    problems: ['too-many-requests'],
  },
  'account.verifyEmail': {
    method: 'POST',
    path: '/api/verify-email',
    summary: 'Confirm an e-mail address with the mailed token',
    permission: 'public',
    body: z.strictObject({ token }),
    problems: ['not-found', 'too-many-requests'],
  },
  'account.requestReset': {
    method: 'POST',
    path: '/api/password-reset',
    summary: 'Ask for a link to choose a new password',
    permission: 'public',
    body: z.strictObject({ email }),
    answer: z.object({ message: z.string() }),
    status: 202,
    problems: ['too-many-requests'],
  },
  'account.reset': {
    method: 'POST',
    path: '/api/password-reset/complete',
    summary: 'Choose a new password with the mailed token',
    permission: 'public',
    body: z.strictObject({ token, password }),
    problems: ['not-found', 'too-many-requests'],
  },
  'account.show': {
    method: 'GET',
    path: '/api/account',
    summary: 'Your own account',
    permission: 'signed-in',
    answer: z.object({
      id,
      name: z.string(),
      email: z.string(),
      emailVerified: z.boolean(),
      oneTimeCodes: z.boolean(),
      /** Whether this person may use one-time codes: shop owners and platform admins. */
      oneTimeCodesOffered: z.boolean(),
      recoveryCodesLeft: z.int(),
      version: z.int(),
    }),
  },
  'account.change': {
    method: 'PATCH',
    path: '/api/account',
    summary: 'Change your name',
    permission: 'signed-in',
    ifMatch: true,
    body: z.strictObject({ name: line(120) }),
    answer: z.object({ name: z.string(), version: z.int() }),
  },
  'account.changePassword': {
    method: 'POST',
    path: '/api/account/password',
    summary: 'Change your password; signs out your other devices',
    permission: 'signed-in',
    idempotency: 'natural',
    body: z.strictObject({ current: z.string().min(1).max(128), password }),
    problems: ['sign-in-refused'],
  },
  'account.startTotp': {
    method: 'POST',
    path: '/api/account/totp',
    summary: 'Begin using one-time codes: a fresh secret, not yet in force',
    permission: 'signed-in',
    idempotency: 'natural',
    answer: z.object({ secret: z.string(), uri: z.string(), qrSvg: z.string() }),
    problems: ['conflict', 'not-allowed'],
  },
  'account.confirmTotp': {
    method: 'POST',
    path: '/api/account/totp/confirm',
    summary: 'Put one-time codes in force with a first code; answers with the recovery codes',
    permission: 'signed-in',
    idempotency: 'natural',
    body: z.strictObject({ code: oneTimeCode }),
    answer: recoveryCodes,
    status: 200,
    problems: ['conflict', 'sign-in-refused'],
  },
  'account.removeTotp': {
    method: 'POST',
    path: '/api/account/totp/remove',
    summary: 'Stop using one-time codes; ends the recovery codes too',
    permission: 'signed-in',
    idempotency: 'natural',
    body: z.strictObject({ code: proof }),
    problems: ['conflict', 'sign-in-refused'],
  },
  'account.renewRecoveryCodes': {
    method: 'POST',
    path: '/api/account/recovery-codes',
    summary: 'Make new recovery codes; those before end',
    permission: 'signed-in',
    idempotency: 'natural',
    body: z.strictObject({ password: z.string().min(1).max(128) }),
    answer: recoveryCodes,
    status: 200,
    problems: ['conflict', 'sign-in-refused'],
  },
});
