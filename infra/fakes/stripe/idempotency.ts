import { createHash } from 'node:crypto';
import { type Books } from './books';
import { ApiError } from './errors';
import { type Reply } from './reply';

const pruneAfterSeconds = 24 * 3600;
const shelf = '_idempotency';

function reused(key: string): ApiError {
  return new ApiError(400, {
    type: 'idempotency_error',
    message:
      'Keys for idempotent requests can only be used with the same parameters they were ' +
      `first used with. Try using a key other than '${key}' if you meant another request.`,
  });
}

function inUse(key: string): ApiError {
  return new ApiError(409, {
    type: 'idempotency_error',
    code: 'idempotency_key_in_use',
    message: `There is currently another in-progress request using the key '${key}'.`,
  });
}

/**
 * A key is bound to the first request that came with it: a repeat gets the first answer, another
 * request with the key is refused, and one that comes while the first is worked is told to wait.
 */
export class IdempotencyKeys {
  private readonly working = new Map<string, string>();

  constructor(private readonly books: Books) {}

  async answer(
    account: string,
    key: string,
    request: string,
    work: () => Promise<Reply>,
  ): Promise<Reply> {
    const id = `${account}|${key}`;
    const fingerprint = createHash('sha256').update(request).digest('hex');
    const now = Math.floor(Date.now() / 1000);
    const inProgress = this.working.get(id);
    if (inProgress) throw inProgress === fingerprint ? inUse(key) : reused(key);
    const kept = this.books.get(shelf, id);
    if (kept && now - kept.created < pruneAfterSeconds) {
      if (kept.fingerprint !== fingerprint) throw reused(key);
      const reply = kept.reply as Reply;
      return { ...reply, headers: { ...reply.headers, 'idempotent-replayed': 'true' } };
    }
    this.working.set(id, fingerprint);
    try {
      const reply = await work();
      // What was refused before anything began may be sent again, corrected, with the same key.
      if (reply.status < 400 || reply.status === 402 || reply.status >= 500) {
        this.books.put(shelf, { id, object: shelf, created: now, fingerprint, reply });
      }
      return reply;
    } finally {
      this.working.delete(id);
    }
  }
}
