import { createHash } from 'node:crypto';
import { type Operation } from '@lib/contracts';
import { type Request } from 'express';
import { v7 as uuid } from 'uuid';
import { type Context } from '../context';
import { row, write } from '../database/tenancy';
import { invalid, problem } from '../problems/problem';

interface Stored {
  operation: string;
  fingerprint: string;
  status: number;
  answer: unknown;
}

const keyShape = /^[A-Za-z0-9_-]{16,100}$/;

/** The caller's Idempotency-Key (IETF draft-ietf-httpapi-idempotency-key-header). */
export function idempotencyKey(request: Request): string {
  const key = request.get('idempotency-key');
  if (!key) throw problem('key-required');
  if (!keyShape.test(key)) {
    throw problem('key-required', 'An Idempotency-Key is 16 to 100 letters, digits, - or _.');
  }
  return key;
}

/**
 * Runs `work` once per key, in the transaction that is open around it: the key, the write and the
 * stored answer commit together. A second request with the key waits for the first and gets its answer.
 */
export async function onceByKey(
  context: Context,
  operation: Operation,
  key: string,
  input: { params: unknown; body: unknown },
  status: number,
  work: () => Promise<unknown>,
): Promise<{ answer: unknown; repeated: boolean }> {
  const fingerprint = createHash('sha256')
    .update(JSON.stringify([operation.id, input.params, input.body]))
    .digest('base64url');
  const bind = { shopId: context.shopId, membershipId: context.membershipId, key };
  const [mine] = await write<{ id: string }>(
    `insert into idempotency_keys (shop_id, id, membership_id, key, operation, fingerprint)
     values ($shopId, $id, $membershipId, $key, $operation, $fingerprint)
     on conflict (shop_id, membership_id, key) do nothing returning id`,
    { ...bind, id: uuid(), operation: operation.id, fingerprint },
  );
  if (!mine) return { answer: await firstAnswer(bind, fingerprint), repeated: true };
  const answer = (await work()) ?? null;
  await write(
    `update idempotency_keys set status = $status, answer = $answer
     where shop_id = $shopId and id = $id`,
    { shopId: context.shopId, id: mine.id, status, answer: JSON.stringify(answer) },
  );
  return { answer, repeated: false };
}

async function firstAnswer(bind: Record<string, unknown>, fingerprint: string): Promise<unknown> {
  const stored = await row<Stored>(
    `select operation, fingerprint, status, answer from idempotency_keys
     where shop_id = $shopId and membership_id = $membershipId and key = $key`,
    bind,
  );
  if (!stored) throw invalid([], 'The first request with this key is not finished: try again.');
  if (stored.fingerprint !== fingerprint) throw problem('key-reused');
  return stored.answer;
}
