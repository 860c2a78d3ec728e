import { type Subscription, type SubscriptionEvent } from './subscription-api';

type Standing = Pick<
  Subscription,
  'state' | 'pausedByPlatform' | 'trialEndsAt' | 'graceEndsAt' | 'paidUntil'
>;

export interface Told {
  readonly words: string;
  readonly tone: 'plain' | 'waiting' | 'alarm';
}

/** How the subscription stands and what that means for the shop's work. */
export function standingWords(standing: Standing, day: (instant: string) => string): Told {
  const { state, pausedByPlatform, trialEndsAt, graceEndsAt, paidUntil } = standing;
  switch (state) {
    case 'trialing':
      return {
        words: trialEndsAt
          ? `You are trying it out until ${day(trialEndsAt)}. Choose a plan before then to go on.`
          : 'You are trying it out. Choose a plan to go on.',
        tone: 'waiting',
      };
    case 'active':
      return {
        words: paidUntil ? `Paid until ${day(paidUntil)}.` : 'In force.',
        tone: 'plain',
      };
    case 'past_due':
      return {
        words: graceEndsAt
          ? `The last bill is not paid. Everything works until ${day(graceEndsAt)}; after that you ` +
            'can read and export, and change nothing until it is paid.'
          : 'The last bill is not paid.',
        tone: 'alarm',
      };
    case 'paused':
      return {
        words: pausedByPlatform
          ? 'The platform paused the shop: everything can be read and exported, nothing changed, ' +
            'and nothing is billed. Only the platform opens it again; write to its support.'
          : 'The shop is paused: everything can be read and exported, nothing changed. Choosing a ' +
            'plan and paying opens it again.',
        tone: 'alarm',
      };
    case 'canceled':
      return {
        words:
          'The subscription has ended. Everything can be read and exported. Choosing a plan and ' +
          'paying opens the shop again.',
        tone: 'alarm',
      };
  }
}

const events: Record<string, string> = {
  trial_ended: 'The trial ended',
  payment_succeeded: 'Paid',
  payment_failed: 'A payment failed',
  grace_ended: 'The time to pay ran out',
  paused: 'Paused by the platform',
  resumed: 'Resumed by the platform',
  canceled: 'Ended',
  ended: 'Ended by the platform',
  resubscribed: 'A plan was taken again',
  plan_changed: 'The plan changed',
};

export function eventWords({ event, note }: Pick<SubscriptionEvent, 'event' | 'note'>): string {
  const words = events[event] ?? event.replaceAll('_', ' ');
  return note ? `${words}: ${note}` : words;
}
