import { type Operation, type OperationId, operations } from '@lib/contracts';
import { parseSetCookie } from 'cookie';
import { type Express } from 'express';
import request, { type Response } from 'supertest';
import { type Ask, told } from './api';

/** Asks without a token and keeps cookies as a browser does: for what stands before a session. */
export class Browser {
  readonly cookies = new Map<string, string>();
  /** The attributes each cookie was last set with. */
  readonly attributes = new Map<string, ReturnType<typeof parseSetCookie>>();

  constructor(private readonly app: Express) {}

  async call(
    id: OperationId,
    ask: Pick<Ask, 'params' | 'body'> & { headers?: Record<string, string>; token?: string } = {},
  ): Promise<Response> {
    const operation = operations[id] as Operation;
    const path = operation.path.replaceAll(/:(\w+)/g, (_, name: string) =>
      encodeURIComponent(ask.params?.[name] ?? ''),
    );
    const method = operation.method.toLowerCase() as 'get' | 'post' | 'put' | 'patch' | 'delete';
    let sent = request(this.app)[method](path);
    if (/^\/api\/session($|\/)/.test(path) && this.cookies.size) {
      const pairs = [...this.cookies].map(([name, value]) => `${name}=${value}`);
      sent = sent.set('Cookie', pairs.join('; '));
    }
    if (ask.token) sent = sent.set('Authorization', `Bearer ${ask.token}`);
    for (const [name, value] of Object.entries(ask.headers ?? {})) sent = sent.set(name, value);
    const answer = await (ask.body === undefined ? sent : sent.send(ask.body as object));
    this.keep(answer);
    return told(operation, answer);
  }

  private keep(answer: Response): void {
    for (const line of (answer.get('Set-Cookie') ?? []) as string[]) {
      const cookie = parseSetCookie(line);
      if (!cookie) continue;
      this.attributes.set(cookie.name, cookie);
      const gone = cookie.expires !== undefined && cookie.expires.getTime() <= Date.now();
      if (gone) this.cookies.delete(cookie.name);
      else this.cookies.set(cookie.name, cookie.value ?? '');
    }
  }
}
