import { createHmac, randomBytes, timingSafeEqual } from 'node:crypto';
import { parseCookie } from 'cookie';
import { type CookieOptions, type Request, type Response } from 'express';
import { config } from '../../core/config';
import { idleDays } from './start-session';

/** Sent to the session's own operations only, never by another site, and unseen by any script. */
function options(days: number): CookieOptions {
  return {
    httpOnly: true,
    sameSite: 'strict',
    secure: config().publicUrl.startsWith('https:'),
    path: '/api/session',
    maxAge: days * 86_400_000,
  };
}

export function giveRefreshToken(response: Response, token: string): void {
  response.cookie('tw_refresh', token, options(idleDays));
}

export function takeRefreshToken(response: Response): void {
  const { maxAge: _, ...rest } = options(0);
  response.clearCookie('tw_refresh', rest);
}

/**
 * The refresh token of the browser, unless another site made it send one: SameSite keeps the cookie
 * at home already, and this holds where a sister site or an old browser would not (decision 0004).
 */
export function refreshTokenOf(request: Request): string | undefined {
  const site = request.get('sec-fetch-site');
  if (site && site !== 'same-origin' && site !== 'none') return undefined;
  const token = parseCookie(request.get('cookie') ?? '').tw_refresh;
  return token && /^[A-Za-z0-9_-]{43}$/.test(token) ? token : undefined;
}

/**
 * Marks the browser as one that signed in with this address before. Failures of such a browser are
 * counted apart, so that a stranger behind the same network address cannot delay its owner.
 */
export function giveDevice(response: Response, email: string): void {
  const nonce = randomBytes(16).toString('base64url');
  response.cookie('tw_device', `${nonce}.${deviceSignature(email, nonce)}`, options(365));
}

/** The mark of this browser for this address, if it is genuine. */
export function deviceOf(request: Request, email: string): string | undefined {
  const cookie = parseCookie(request.get('cookie') ?? '').tw_device ?? '';
  const [nonce, signature] = cookie.split('.');
  if (!nonce || !signature) return undefined;
  const genuine = Buffer.from(deviceSignature(email, nonce));
  const given = Buffer.from(signature);
  return given.length === genuine.length && timingSafeEqual(given, genuine) ? nonce : undefined;
}

function deviceSignature(email: string, nonce: string): string {
  return createHmac('sha256', config().sessionSecret)
    .update(`device:${email}:${nonce}`)
    .digest('base64url');
}
