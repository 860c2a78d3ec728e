// Written by `npm run contracts` from the contracts: do not edit by hand.

/** Method, path, and whether an Idempotency-Key goes with it. */
export type Route = readonly [method: string, path: string, keyed?: true];

export const routes = {
  'session.signIn': ['POST', '/api/session'],
  'session.refresh': ['POST', '/api/session/refresh'],
  'session.switch': ['POST', '/api/session/membership'],
  'session.signOut': ['DELETE', '/api/session'],
  'session.list': ['GET', '/api/sessions'],
  'session.signOutEverywhere': ['DELETE', '/api/sessions'],
  'shops.signUp': ['POST', '/api/sign-up'],
  'account.verifyEmail': ['POST', '/api/verify-email'],
  'account.requestReset': ['POST', '/api/password-reset'],
  'account.reset': ['POST', '/api/password-reset/complete'],
  'invitations.look': ['GET', '/api/invitations/:token'],
  'invitations.accept': ['POST', '/api/invitations/:token/accept'],
  'account.show': ['GET', '/api/account'],
  'account.change': ['PATCH', '/api/account'],
  'account.changePassword': ['POST', '/api/account/password'],
  'account.startTotp': ['POST', '/api/account/totp'],
  'account.confirmTotp': ['POST', '/api/account/totp/confirm'],
  'account.removeTotp': ['POST', '/api/account/totp/remove'],
} as const satisfies Record<string, Route>;
