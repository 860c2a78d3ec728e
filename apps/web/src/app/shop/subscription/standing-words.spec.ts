import { eventWords, standingWords } from './standing-words';

const day = (instant: string) => instant.slice(0, 10);
const standing = { pausedByPlatform: false, trialEndsAt: null, graceEndsAt: null, paidUntil: null };

describe('standingWords', () => {
  it('says until when it is tried, paid, or tolerated', () => {
    const trial = { ...standing, state: 'trialing', trialEndsAt: '2031-05-30T00:00:00Z' } as const;
    expect(standingWords(trial, day).words).toContain('until 2031-05-30');
    const paid = { ...standing, state: 'active', paidUntil: '2031-06-06T00:00:00Z' } as const;
    expect(standingWords(paid, day)).toEqual({ words: 'Paid until 2031-06-06.', tone: 'plain' });
    const late = { ...standing, state: 'past_due', graceEndsAt: '2031-05-14T00:00:00Z' } as const;
    expect(standingWords(late, day).words).toContain('Everything works until 2031-05-14');
  });

  it('does not promise that paying opens what the platform paused', () => {
    const held = { ...standing, state: 'paused', pausedByPlatform: true } as const;
    const { words } = standingWords(held, day);
    expect(words).toContain('Only the platform opens it again');
    expect(words).not.toContain('paying');
  });

  it('says that a paused or ended shop loses nothing, and what opens it', () => {
    for (const state of ['paused', 'canceled'] as const) {
      const { words, tone } = standingWords({ ...standing, state }, day);
      expect(words).toContain('verything can be read and exported');
      expect(words).toContain('opens');
      expect(tone).toBe('alarm');
    }
  });
});

describe('eventWords', () => {
  it('says what happened, with the note', () => {
    expect(eventWords({ event: 'plan_changed', note: 'Depot' })).toBe('The plan changed: Depot');
    expect(eventWords({ event: 'card_replaced', note: '' })).toBe('card replaced');
  });
});
