import { type HandedOver } from './mailer';

/**
 * The life of a mail that is a row: waiting -> handing_over -> sent | failed | uncertain, or back to
 * waiting. `handing_over` is committed before the SMTP conversation, with the attempt's number and a
 * lease; what the conversation came to is then written by that attempt only (`where attempt = ...`).
 */

/** Longer than any conversation may last, so that a lease runs out only when its process is gone. */
export const leaseSeconds = 300;

const minutes = [1, 2, 5, 15, 30, 60, 120, 240, 480, 720];
/** About a day of trying; then a person is told. */
export const mostAttempts = minutes.length + 1;

export interface Settled {
  state: 'waiting' | 'sent' | 'failed' | 'uncertain';
  /** When a waiting mail is tried again. */
  nextAttemptAt: Date | null;
  error: string | null;
}

/** What becomes of a mail after attempt number `attempt` (from 1) ended so. */
export function settle(handedOver: HandedOver, attempt: number, now: Date): Settled {
  if (handedOver.outcome === 'sent') return { state: 'sent', nextAttemptAt: null, error: null };
  const { outcome, error } = handedOver;
  if (outcome !== 'retry') return { state: outcome, nextAttemptAt: null, error };
  const wait = minutes[attempt - 1];
  if (wait === undefined) {
    return {
      state: 'failed',
      nextAttemptAt: null,
      error: `Gave up after ${attempt} tries: ${error}`,
    };
  }
  return { state: 'waiting', nextAttemptAt: new Date(now.getTime() + wait * 60_000), error };
}

/**
 * What becomes of a mail whose lease ran out while handing over: the process ended in the middle, so
 * nobody knows whether the server has it. Only a person may decide to send it again.
 */
export function settleLost(): Settled {
  return {
    state: 'uncertain',
    nextAttemptAt: null,
    error: 'The process that was sending this mail ended before the mail server answered.',
  };
}
