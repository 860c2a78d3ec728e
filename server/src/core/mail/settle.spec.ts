import { mostAttempts, settle, settleLost } from './settle';

const now = new Date('2031-04-01T10:00:00Z');

describe('what becomes of a mail', () => {
  it('is sent when the server took it', () => {
    expect(settle({ outcome: 'sent' }, 1, now)).toEqual({
      state: 'sent',
      nextAttemptAt: null,
      error: null,
    });
  });

  it('waits longer after each passing refusal', () => {
    const waits = [1, 2, 3, 4].map((attempt) => {
      const settled = settle({ outcome: 'retry', error: '451 busy' }, attempt, now);
      expect(settled.state).toBe('waiting');
      return (settled.nextAttemptAt as Date).getTime() - now.getTime();
    });
    expect(waits).toEqual([...waits].sort((a, b) => a - b));
    expect(new Set(waits).size).toBe(waits.length);
  });

  it('fails visibly after the last try, and at once when refused for good', () => {
    const last = settle({ outcome: 'retry', error: '451 busy' }, mostAttempts, now);
    expect(last).toMatchObject({ state: 'failed', nextAttemptAt: null });
    expect(last.error).toContain('451 busy');
    expect(settle({ outcome: 'failed', error: '550 no' }, 1, now)).toEqual({
      state: 'failed',
      nextAttemptAt: null,
      error: '550 no',
    });
  });

  it('is uncertain, never waiting, when the answer was lost', () => {
    expect(settle({ outcome: 'uncertain', error: 'closed' }, 1, now).state).toBe('uncertain');
    expect(settleLost().state).toBe('uncertain');
    expect(settleLost().nextAttemptAt).toBeNull();
  });
});
