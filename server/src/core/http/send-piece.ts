import { once } from 'node:events';
import { type Response } from 'express';

/**
 * Writes a piece of a long answer, and waits while the reader is slower than the database, so that
 * memory never holds what nobody takes. False: the reader has left, and nothing more need be read.
 */
export async function sendPiece(response: Response, piece: string): Promise<boolean> {
  if (response.destroyed) return false;
  if (response.write(piece)) return true;
  const waiting = new AbortController();
  const { signal } = waiting;
  await Promise.race([
    once(response, 'drain', { signal }),
    once(response, 'close', { signal }),
  ]).finally(() => waiting.abort());
  return !response.destroyed;
}
