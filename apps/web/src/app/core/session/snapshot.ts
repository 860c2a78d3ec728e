import { type AnswerOf } from '@lib/contracts/web';

export type SessionAnswer = AnswerOf<'session.signIn'>;
/** What the browser may keep of a session between visits: everything but the token. */
export type Snapshot = Omit<SessionAnswer, 'accessToken' | 'expiresAt'>;
export type ShopOfSession = NonNullable<SessionAnswer['shop']>;

const place = 'tw.session';

/**
 * Kept so that the field area opens without a signal, and so that a browser that never signed in
 * does not ask the server about it. Gone at sign-out.
 */
export const snapshots = {
  keep(answer: SessionAnswer): Snapshot {
    const { accessToken: _token, expiresAt: _until, ...snapshot } = answer;
    try {
      localStorage.setItem(place, JSON.stringify(snapshot));
    } catch {
      // Storage may be full or forbidden; everything but the offline start works without.
    }
    return snapshot;
  },

  read(): Snapshot | undefined {
    try {
      const text = localStorage.getItem(place);
      return text ? (JSON.parse(text) as Snapshot) : undefined;
    } catch {
      return undefined;
    }
  },

  forget(): void {
    try {
      localStorage.removeItem(place);
    } catch {
      // Nothing was kept where nothing may be kept.
    }
  },
};
