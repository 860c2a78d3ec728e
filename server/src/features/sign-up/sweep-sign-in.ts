import { forgetOldSessions } from '../session/end-session';
import { forgetOldTries } from '../session/sign-in-failures';
import { forgetOldSignUps } from './request-sign-up';

/** For the sweep: what sign-in need not remember any longer. */
export async function sweepSignIn(): Promise<void> {
  await forgetOldTries();
  await forgetOldSessions();
  await forgetOldSignUps();
}
