import { randomUUID } from 'node:crypto';
import { run } from './run';
import { password } from './works';

interface Session {
  accessToken: string;
  membership: { id: string };
}

/** Asks the API as somebody, for what a story presupposes and does not tell. */
export class ShopApi {
  private constructor(private readonly session: Session) {}

  static async of(email: string): Promise<ShopApi> {
    const answer = await fetch(`${run.web}/api/session`, {
      method: 'POST',
      headers: { 'content-type': 'application/json' },
      body: JSON.stringify({ email, password }),
    });
    if (!answer.ok) throw new Error(`${email} cannot sign in: ${await answer.text()}`);
    return new ShopApi((await answer.json()) as Session);
  }

  get membershipId(): string {
    return this.session.membership.id;
  }

  get<T>(path: string): Promise<T> {
    return this.ask('GET', path);
  }

  post<T>(path: string, body: unknown): Promise<T> {
    return this.ask('POST', path, body);
  }

  private async ask<T>(method: string, path: string, body?: unknown): Promise<T> {
    const answer = await fetch(`${run.web}${path}`, {
      method,
      headers: {
        authorization: `Bearer ${this.session.accessToken}`,
        'content-type': 'application/json',
        'idempotency-key': randomUUID(),
      },
      body: body === undefined ? undefined : JSON.stringify(body),
    });
    if (!answer.ok) throw new Error(`${method} ${path}: ${answer.status} ${await answer.text()}`);
    return (await answer.json()) as T;
  }
}
