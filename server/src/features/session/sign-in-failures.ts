import { createHmac } from 'node:crypto';
import { config } from '../../core/config';
import { platformRow, platformRows, withPlatform } from '../../core/database/tenancy';

/** Tries that cost no waiting: people mistype. */
const freeTries = 5;
const longestWaitSeconds = 900;
const forgottenAfterHours = 24;

/** Whose tries are counted together: one address from one source. */
export interface TryKey {
  emailHash: string;
  sourceHash: string;
}

/**
 * The source is the browser's own mark when it signed in with this address before, else the network
 * address (the first half of an IPv6 one: the rest changes by itself).
 */
export function tryKey(email: string, source: string, device: string | undefined): TryKey {
  const network = source.includes(':') ? source.split(':').slice(0, 4).join(':') : source;
  return {
    emailHash: hash(`email:${email}`),
    sourceHash: hash(device ? `device:${device}` : `source:${network}`),
  };
}

function hash(text: string): string {
  return createHmac('sha256', config().sessionSecret).update(`try:${text}`).digest('base64url');
}

/** How long after so many failures the next try is heard: 1 s after the sixth, then doubling. */
export function waitSeconds(failures: number): number {
  if (failures < freeTries) return 0;
  return Math.min(longestWaitSeconds, 2 ** (failures - freeTries));
}

/**
 * Counts a try as failed before it is judged, so that many at once cannot slip through together.
 * False: it comes too early and is not heard. Tries that are not heard do not count, so a lock never
 * outlasts the guessing by more than the guessing itself took.
 */
export function countTry(key: TryKey, now: Date): Promise<boolean> {
  return withPlatform(async () => {
    const bind = { ...key, now };
    await platformRows(
      `insert into sign_in_failures (email_hash, source_hash, failures, last_at)
       values ($emailHash, $sourceHash, 0, $now) on conflict do nothing`,
      bind,
    );
    const counted = await platformRow<{ failures: number; last_at: Date }>(
      `select failures, last_at from sign_in_failures
       where email_hash = $emailHash and source_hash = $sourceHash for update`,
      { ...key },
    );
    if (!counted) return true;
    const sinceSeconds = (now.getTime() - counted.last_at.getTime()) / 1000;
    const failures = sinceSeconds > forgottenAfterHours * 3600 ? 0 : counted.failures;
    if (sinceSeconds < waitSeconds(failures)) return false;
    await platformRows(
      `update sign_in_failures set failures = $failures, last_at = $now
       where email_hash = $emailHash and source_hash = $sourceHash`,
      { ...bind, failures: failures + 1 },
    );
    return true;
  });
}

/** The try was right after all. */
export async function forgetTries(key: TryKey): Promise<void> {
  await platformRows(
    'delete from sign_in_failures where email_hash = $emailHash and source_hash = $sourceHash',
    { ...key },
  );
}

/** The try was neither right nor wrong: a one-time code is still missing. */
export async function giveTryBack(key: TryKey): Promise<void> {
  await platformRows(
    `update sign_in_failures set failures = greatest(0, failures - 1)
     where email_hash = $emailHash and source_hash = $sourceHash`,
    { ...key },
  );
}

/** Whoever reads the address's mail has shown who they are: nothing is held against it. */
export async function forgetTriesOfAddress(email: string): Promise<void> {
  await platformRows('delete from sign_in_failures where email_hash = $emailHash', {
    emailHash: hash(`email:${email}`),
  });
}

/** For the sweep. */
export async function forgetOldTries(): Promise<void> {
  await platformRows(
    'delete from sign_in_failures where last_at < now() - make_interval(hours => $hours)',
    { hours: forgottenAfterHours },
  );
}
