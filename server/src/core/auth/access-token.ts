import { createSecretKey, type KeyObject } from 'node:crypto';
import { type Role } from '@lib/contracts';
import jwt from 'jsonwebtoken';
import passport from 'passport';
import { ExtractJwt, Strategy } from 'passport-jwt';

/** What an access token says: who, on which chain of devices, and as what they work now. */
export interface Claims {
  sub: string;
  sid: string;
  name: string;
  mid?: string;
  role?: Role;
  shop?: string;
  client?: string;
  store?: string;
}

const issuer = 'tumblewright';
/** Short, because a token is not looked up: what was taken away ends with it. */
const accessTokenSeconds = 600;

let key: { secret: string; object: KeyObject } | undefined;

/** A bare secret would be tried as a public key first, for a fifth of a request's time. */
function keyOf(secret: string): KeyObject {
  if (key?.secret !== secret) key = { secret, object: createSecretKey(Buffer.from(secret)) };
  return key.object;
}

export function signAccessToken(
  claims: Claims,
  secret: string,
): { token: string; expiresAt: Date } {
  const token = jwt.sign(claims, keyOf(secret), {
    algorithm: 'HS256',
    issuer,
    expiresIn: accessTokenSeconds,
  });
  return { token, expiresAt: new Date(Date.now() + accessTokenSeconds * 1000) };
}

export function useAccessTokens(secret: string): void {
  passport.use(
    new Strategy(
      {
        jwtFromRequest: ExtractJwt.fromAuthHeaderAsBearerToken(),
        // The strategy hands it on as it is; its types only know texts.
        secretOrKey: keyOf(secret) as unknown as string,
        algorithms: ['HS256'],
        issuer,
      },
      (claims: Claims, done) => done(null, claims),
    ),
  );
}

/** For operations open to the public that know their caller all the same; undefined when they do not. */
export function readAccessToken(header: string | undefined, secret: string): Claims | undefined {
  const token = /^Bearer (\S+)$/i.exec(header ?? '')?.[1];
  if (!token) return undefined;
  try {
    return jwt.verify(token, keyOf(secret), { algorithms: ['HS256'], issuer }) as Claims & object;
  } catch {
    return undefined;
  }
}
