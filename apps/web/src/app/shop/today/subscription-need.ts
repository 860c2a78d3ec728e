import { dayText } from '@lib/ui';
import { type Judge, type Need } from './need';
import { type TodayFacts } from './today-facts';

/** A trial that ends so soon is told of. */
const soon = 7;

/** What is to be said of the shop's own plan. */
export const subscription: Judge = ({ subscription }, { locale, today }) => {
  const state = subscription?.state;
  if (state === 'paused' || state === 'canceled') {
    const words = state === 'paused' ? 'The shop is paused' : 'The subscription has ended';
    const detail = subscription?.pausedByPlatform
      ? 'Everything can be read and exported. Only the platform opens it again.'
      : 'Everything can be read and exported. Choose a plan to write again.';
    return { ...toSubscription, id: 'paused', words, detail, pressing: true };
  }
  if (state === 'past_due') {
    const until = subscription?.graceEndsAt?.slice(0, 10);
    return {
      ...toSubscription,
      id: 'past-due',
      words: 'The subscription was not paid',
      detail: until ? `The shop is paused after ${dayText(until, locale)}.` : undefined,
      pressing: true,
    };
  }
  return limits(subscription) ?? trial(subscription, locale, today);
};

function trial(
  subscription: TodayFacts['subscription'],
  locale: string,
  today: string,
): Need | undefined {
  const until = subscription?.state === 'trialing' && subscription.trialEndsAt?.slice(0, 10);
  if (!until || daysBetween(today, until) > soon) return undefined;
  return {
    ...toSubscription,
    id: 'trial',
    words: `The trial ends on ${dayText(until, locale)}`,
    detail: 'Choose a plan, and nothing stops.',
    pressing: false,
  };
}

function daysBetween(from: string, until: string): number {
  return (Date.parse(until) - Date.parse(from)) / 86_400_000;
}

function limits(subscription: TodayFacts['subscription']): Need | undefined {
  const reached = subscription?.usage.filter(({ level }) => level !== 'within') ?? [];
  const at = reached.some(({ level }) => level === 'at');
  if (reached.length === 0) return undefined;
  return {
    ...toSubscription,
    id: 'limits',
    words: at ? 'The plan is full' : 'The plan is nearly full',
    detail: reached.map(({ words }) => words).join(' '),
    pressing: at,
  };
}

const toSubscription = {
  count: 0,
  link: '/shop/subscription',
  label: 'See the plan',
} as const;
