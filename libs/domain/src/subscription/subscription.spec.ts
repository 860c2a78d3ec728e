import * as fc from 'fast-check';
import { limitsNotice, mayAdd } from './plan-limits';
import {
  type SubscriptionEvent,
  type SubscriptionState,
  type Standing,
  graceEndsAt,
  mayWrite,
  nextStanding,
  nextState,
} from './subscription-state';

const states = ['trialing', 'active', 'past_due', 'paused', 'canceled'] as const;
const events = [
  'trial_ended',
  'payment_succeeded',
  'payment_failed',
  'grace_ended',
  'paused',
  'resumed',
  'canceled',
  'ended',
  'resubscribed',
] as const;

function after(state: SubscriptionState, ...happened: SubscriptionEvent[]): SubscriptionState {
  return happened.reduce(nextState, state);
}

describe('a subscription', () => {
  it('goes from trial to paid, and from unpaid through grace to paused and back', () => {
    expect(after('trialing', 'payment_succeeded')).toBe('active');
    expect(after('trialing', 'trial_ended')).toBe('past_due');
    expect(after('active', 'payment_failed')).toBe('past_due');
    expect(after('active', 'payment_failed', 'payment_succeeded')).toBe('active');
    expect(after('active', 'payment_failed', 'grace_ended')).toBe('paused');
    expect(after('active', 'payment_failed', 'grace_ended', 'payment_succeeded')).toBe('active');
    expect(after('active', 'paused', 'resumed')).toBe('active');
  });

  it('is not paused by a sweep that comes after the payment', () => {
    expect(after('past_due', 'payment_succeeded', 'grace_ended')).toBe('active');
    expect(after('active', 'trial_ended')).toBe('active');
  });

  it('once canceled is revived only by taking a plan again', () => {
    for (const event of events.filter((each) => each !== 'resubscribed'))
      expect(nextState('canceled', event)).toBe('canceled');
    expect(nextState('canceled', 'resubscribed')).toBe('active');
  });

  it('takes an event told twice as told once', () => {
    const state = fc.constantFrom(...states);
    fc.assert(
      fc.property(state, fc.constantFrom(...events), (from, event) => {
        expect(after(from, event, event)).toBe(after(from, event));
      }),
    );
  });
});

describe('a shop a platform admin paused', () => {
  const free = (state: SubscriptionState): Standing => ({ state, heldFrom: null });
  const standing = (from: SubscriptionState, ...happened: SubscriptionEvent[]): Standing =>
    happened.reduce(nextStanding, free(from));

  it('stays paused whatever is paid, refused, chosen or ended at the card service', () => {
    const states = fc.constantFrom('trialing', 'active', 'past_due', 'paused' as const);
    const others = fc.constantFrom(...events.filter((e) => e !== 'resumed' && e !== 'ended'));
    fc.assert(
      fc.property(states, fc.array(others, { maxLength: 8 }), (from, happened) => {
        expect(standing(from, 'paused', ...happened).state).toBe('paused');
      }),
    );
  });

  it('resumes to where it would be had nobody paused it', () => {
    expect(standing('trialing', 'paused', 'resumed')).toEqual(free('trialing'));
    expect(standing('past_due', 'paused', 'resumed')).toEqual(free('past_due'));
    expect(standing('past_due', 'paused', 'payment_succeeded', 'resumed')).toEqual(free('active'));
    expect(standing('active', 'paused', 'payment_failed', 'resumed')).toEqual(free('past_due'));
    expect(standing('active', 'paused', 'canceled', 'resumed')).toEqual(free('canceled'));
  });

  it('was perhaps paused for want of payment before, and is opened by resuming it', () => {
    const held = standing('past_due', 'grace_ended', 'paused');
    expect(held).toEqual({ state: 'paused', heldFrom: 'paused' });
    expect(nextStanding(held, 'payment_succeeded').state).toBe('paused');
    expect(nextStanding(held, 'resumed')).toEqual(free('active'));
    expect(standing('past_due', 'grace_ended', 'payment_succeeded')).toEqual(free('active'));
  });

  it('is let go when an admin ends the subscription', () => {
    expect(standing('active', 'paused', 'ended')).toEqual(free('canceled'));
    expect(standing('canceled', 'paused')).toEqual(free('canceled'));
  });
});

describe('writing', () => {
  const since = '2026-03-01T10:00:00.000Z';

  it('is open in trial and when paid, closed when paused or canceled', () => {
    const later = '2027-01-01T00:00:00Z';
    expect(states.map((state) => mayWrite(state, since, later, 14))).toEqual([
      true,
      true,
      false,
      false,
      false,
    ]);
  });

  it('stays open for the days of grace, to the minute', () => {
    expect(graceEndsAt(since, 14)).toBe('2026-03-15T10:00:00.000Z');
    expect(mayWrite('past_due', since, '2026-03-15T09:59:59.999Z', 14)).toBe(true);
    expect(mayWrite('past_due', since, new Date('2026-03-15T10:00:00Z'), 14)).toBe(false);
    expect(mayWrite('past_due', since, since, 0)).toBe(false);
    expect(() => graceEndsAt(since, -1)).toThrow(RangeError);
  });
});

describe("a plan's limits", () => {
  const limits = { stores: 10, machines: 200, crew: 1 };

  it('are told before, at and past them in plain words', () => {
    const notices = limitsNotice(limits, { stores: 7, machines: 160, crew: 1 });
    expect(notices.map(({ level }) => level)).toEqual(['within', 'near', 'at']);
    expect(notices.map(({ words }) => words)).toEqual([
      '7 of 10 stores in your plan.',
      '160 of 200 machines in your plan: 40 more can be added.',
      '1 of 1 member of your crew in your plan: no more can be added. ' +
        'Everything you have stays and keeps working; a larger plan lets you add more.',
    ]);
    const past = limitsNotice(limits, { stores: 12, machines: 159, crew: 0 });
    expect(past.map(({ level }) => level)).toEqual(['at', 'within', 'within']);
  });

  it('let in exactly as many as they say', () => {
    const usage = { stores: 9, machines: 0, crew: 5 };
    expect(mayAdd(limits, usage, 'stores')).toBe(true);
    expect(mayAdd(limits, usage, 'stores', 2)).toBe(false);
    expect(mayAdd(limits, usage, 'machines', 200)).toBe(true);
    expect(mayAdd(limits, usage, 'machines', 201)).toBe(false);
    expect(mayAdd(limits, usage, 'crew')).toBe(false);
  });
});
