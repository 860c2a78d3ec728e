import { type SubscriptionState } from '@lib/contracts/web';
import { wordFor } from '@lib/ui/words/words';
import { type Plan, type Shop } from '../platform-api';

const words: Record<SubscriptionState, string> = {
  trialing: 'on trial',
  active: 'active',
  past_due: 'past due',
  paused: 'paused',
  canceled: 'ended',
};

/** The state of a subscription as a person says it; the stored words are those of card services. */
export function stateWords(state: SubscriptionState): string {
  return words[state];
}

/** Whether somebody should look at the shop. */
export function needsLook(state: SubscriptionState): boolean {
  return state === 'past_due' || state === 'paused';
}

const happened: Record<string, string> = {
  trial_ended: 'The trial ended',
  payment_succeeded: 'Paid',
  payment_failed: 'A payment failed',
  grace_ended: 'The days of grace were over',
  paused: 'Paused by the platform',
  resumed: 'Resumed by the platform',
  canceled: 'Ended',
  ended: 'Ended by the platform',
  resubscribed: 'A plan was taken again',
  plan_changed: 'Put on another plan',
};

type Event = Shop['events'][number];

/** One line of a subscription's history: "A payment failed: active, then past due." */
export function eventWords({ event, fromState, toState, note }: Event): string {
  const what = happened[event] ?? wordFor(event);
  const moved =
    fromState && toState && fromState !== toState
      ? `: ${stateWords(fromState)}, then ${stateWords(toState)}`
      : '';
  return `${what}${moved}.${note ? ` ${note}` : ''}`;
}

const plural: Record<Shop['usage'][number]['kind'], string> = {
  stores: 'stores',
  machines: 'machines',
  crew: 'people of the crew',
};

const limits = { stores: 'storeLimit', machines: 'machineLimit', crew: 'crewLimit' } as const;

/** What a shop meets on another plan, in words; nothing is ever lost by it. */
export function planConsequence(
  { usage, plan: from }: Pick<Shop, 'usage' | 'plan'>,
  to: Plan,
): string {
  if (to.id === from.id) return `The shop is on ${to.name} already.`;
  const over = usage
    .filter(({ kind, used }) => used > to[limits[kind]])
    .map(({ kind, used }) => `${used} ${plural[kind]} where ${to.name} allows ${to[limits[kind]]}`);
  if (over.length === 0) return `Everything the shop has fits into ${to.name}.`;
  return (
    `The shop has ${over.join(', ')}. It keeps all of it and can work on it, but adds no more until ` +
    'it is within the plan.'
  );
}

export interface Consequence {
  readonly heading: string;
  readonly words: string;
  readonly action: string;
  readonly destructive: boolean;
}

export type Decision = 'pause' | 'resume' | 'cancel';

/** What each decision means for the people of the shop. */
export function consequenceOf(
  decision: Decision,
  shop: Pick<Shop, 'name' | 'stores'>,
): Consequence {
  const people = 'Its owners are told by mail.';
  switch (decision) {
    case 'pause':
      return {
        heading: `Pause ${shop.name}`,
        words:
          'Its people and its clients can read and export everything and change nothing; techs ' +
          `cannot send what they record. It is not billed meanwhile. ${people}`,
        action: 'Pause the shop',
        destructive: true,
      };
    case 'resume':
      return {
        heading: `Resume ${shop.name}`,
        words: `The shop can work again at once, and is billed again. ${people}`,
        action: 'Resume the shop',
        destructive: false,
      };
    case 'cancel':
      return {
        heading: `End the subscription of ${shop.name}`,
        words:
          'It is billed no more and changes nothing any more. Everything can still be read and ' +
          `exported, and the shop itself can choose a plan again at any time. ${people}`,
        action: 'End the subscription',
        destructive: true,
      };
  }
}
