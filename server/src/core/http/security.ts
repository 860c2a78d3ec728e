import { type RequestHandler } from 'express';
import { type Options, rateLimit } from 'express-rate-limit';
import helmet from 'helmet';
import { Problem } from '../problems/problem';

/**
 * Headers for every answer. Scripts come from our own files only. Angular writes component styles
 * into the page, so styles allow inline; nothing else does.
 */
export function securityHeaders(): RequestHandler {
  return helmet({
    contentSecurityPolicy: {
      useDefaults: false,
      directives: {
        defaultSrc: ["'self'"],
        scriptSrc: ["'self'"],
        scriptSrcAttr: ["'none'"],
        styleSrc: ["'self'", "'unsafe-inline'"],
        imgSrc: ["'self'", 'data:', 'blob:'],
        fontSrc: ["'self'"],
        connectSrc: ["'self'"],
        objectSrc: ["'none'"],
        baseUri: ["'self'"],
        formAction: ["'self'"],
        frameAncestors: ["'none'"],
      },
    },
    crossOriginEmbedderPolicy: false,
    strictTransportSecurity: { maxAge: 31_536_000, includeSubDomains: true },
    referrerPolicy: { policy: 'same-origin' },
  });
}

/** At most `perMinute` requests from one address; 0 turns it off. */
export function limitRate(perMinute: number): RequestHandler {
  return limiter(perMinute, {});
}

/**
 * At most `perMinute` guesses from one address. What succeeds by a secret is no guess, so an office
 * where everybody signs in at eight is not held up; what is taken without one (202) counts.
 */
export function limitGuesses(perMinute: number): RequestHandler {
  return limiter(perMinute, {
    skipSuccessfulRequests: true,
    requestWasSuccessful: (_request, response) =>
      response.statusCode < 400 && response.statusCode !== 202,
  });
}

function limiter(perMinute: number, options: Partial<Options>): RequestHandler {
  if (perMinute === 0) return (_request, _response, next) => next();
  return rateLimit({
    ...options,
    windowMs: 60_000,
    limit: perMinute,
    standardHeaders: 'draft-8',
    legacyHeaders: false,
    handler: (_request, _response, next) =>
      next(new Problem('too-many-requests', undefined, undefined, { 'Retry-After': '60' })),
  });
}
