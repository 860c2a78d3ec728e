import { takeCode } from './one-time-code';
import { type Person } from './people';
import { looksLikeRecoveryCode, takeRecoveryCode } from './recovery-codes';

/** Takes what a person shows beside the password: a one-time code, or a recovery code in its place. */
export function takeProof(
  context: { requestId: string; now: Date },
  person: Person,
  typed: string,
): Promise<boolean> {
  return looksLikeRecoveryCode(typed)
    ? takeRecoveryCode(context, person, typed)
    : takeCode(person, typed.trim(), context.now);
}
