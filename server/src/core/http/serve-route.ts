import { type Permission, reachOf, type Role, storesAnswer, successStatus } from '@lib/contracts';
import { type NextFunction, type Request, type Response } from 'express';
import { type Claims } from '../auth/access-token';
import { type Context, type PublicContext, type SignedInContext } from '../context';
import { withTenant } from '../database/tenancy';
import { problem } from '../problems/problem';
import { idempotencyKey, onceByKey } from './idempotency';
import { parseRequest } from './parse';
import { RawReply, type Route } from './route';
import { refuseWhilePaused } from './paused';

/** What every request goes through, in order: who, may they, what do they ask, do it once, answer. */
export function serveRoute(route: Route) {
  const { operation } = route;
  const status = successStatus(operation);
  const permission = operation.permission;
  const shopWrite = operation.method !== 'GET' && isShopPermission(permission);

  return async (request: Request, response: Response, next: NextFunction): Promise<void> => {
    try {
      const context = contextFor(permission, request);
      const input = { ...parseRequest(operation, request), file: fileOf(request) };
      const work = () =>
        route.handler(context as never, input as never, { request, response }) as Promise<unknown>;
      let answer: unknown;
      if (!shopWrite) {
        answer = await work();
      } else if (operation.method === 'POST' && !storesAnswer(operation)) {
        // The use case calls outside services: it opens its own transactions.
        const shop = context as Context;
        if (!operation.whilePaused) await withTenant(shop, () => refuseWhilePaused(shop));
        answer = await work();
      } else {
        const shop = context as Context;
        const key = storesAnswer(operation) ? idempotencyKey(request) : undefined;
        answer = await withTenant(shop, async () => {
          if (!operation.whilePaused) await refuseWhilePaused(shop);
          if (key === undefined) return work();
          const once = await onceByKey(shop, operation, key, input, status, work);
          if (once.repeated) response.set('Idempotency-Replayed', 'true');
          return once.answer;
        });
      }
      await send(response, status, answer);
    } catch (error) {
      next(error);
    }
  };
}

function isShopPermission(permission: string): boolean {
  return (
    permission !== 'public' && permission !== 'signed-in' && !permission.startsWith('platform.')
  );
}

async function send(response: Response, status: number, answer: unknown): Promise<void> {
  if (answer instanceof RawReply) return answer.write(response);
  if (response.headersSent) return;
  if (answer === undefined || answer === null || status === 204) {
    response.status(204).end();
    return;
  }
  const version = (answer as { version?: unknown }).version;
  if (typeof version === 'number') response.set('ETag', `"${version}"`);
  response.status(status).json(answer);
}

function contextFor(permission: Permission | 'signed-in' | 'public', request: Request): unknown {
  const open: PublicContext = {
    requestId: String(request.id),
    now: new Date(),
    source: request.ip ?? '',
    device: (request.get('user-agent') ?? '').slice(0, 200),
  };
  if (permission === 'public') return open;
  const claims = request.user as Claims | undefined;
  if (!claims) throw problem('not-signed-in');
  const signedIn: SignedInContext = {
    ...open,
    userId: claims.sub,
    sessionId: claims.sid,
    name: claims.name,
    membershipId: claims.mid ?? null,
    role: claims.role ?? null,
  };
  if (permission === 'signed-in') return signedIn;
  return permission.startsWith('platform.')
    ? platformContext(signedIn, permission)
    : shopContext(signedIn, claims, permission);
}

function platformContext(signedIn: SignedInContext, permission: Permission): unknown {
  if (!signedIn.role || !reachOf(signedIn.role, permission)) throw problem('not-allowed');
  return { ...signedIn, platform: true };
}

function shopContext(signedIn: SignedInContext, claims: Claims, permission: Permission): Context {
  const reach = reachOf(signedIn.role as Role, permission);
  if (!reach || reach === 'platform' || !claims.shop) throw problem('not-allowed');
  return {
    requestId: signedIn.requestId,
    now: signedIn.now,
    shopId: claims.shop,
    userId: signedIn.userId,
    membershipId: signedIn.membershipId,
    name: signedIn.name,
    role: signedIn.role as Role,
    clientId: reach === 'shop' ? null : (claims.client ?? null),
    storeId: reach === 'store' ? (claims.store ?? null) : null,
  };
}

function fileOf(request: Request): { name: string; content: Buffer } | undefined {
  const file = request.file;
  return file && { name: file.originalname, content: file.buffer };
}
