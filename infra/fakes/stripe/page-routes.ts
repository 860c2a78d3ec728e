import { type Answer } from '../http';
import { platform, type Thing } from './books';
import { type Call } from './call';
import { ApiError } from './errors';
import { absentPage, cardPage, endedPage, onboardingPage, overviewPage } from './pages';
import { finishOnboarding } from './resources/accounts';
import { type CardEntry, current, payWithCard } from './resources/checkout';
import { type Fake } from './stripe-fake';

function seeOther(address: string): Answer {
  return { status: 303, headers: { location: address } };
}

function successAddress(session: Thing): string {
  return String(session.success_url).replaceAll('{CHECKOUT_SESSION_ID}', session.id);
}

/** `12 / 34` as month and year; undefined when it is no month, or one that has passed. */
function expiry(text: string, now: number): { month: number; year: number } | undefined {
  const found = /^(\d{1,2})\s*\/?\s*(\d{2}|\d{4})$/.exec(text.trim());
  const month = Number(found?.[1]);
  const year = Number(found?.[2]) + (found?.[2]?.length === 2 ? 2000 : 0);
  if (!found || month < 1 || month > 12) return undefined;
  return Date.UTC(year, month, 1) > now * 1000 ? { month, year } : undefined;
}

function entered(body: string, now: number): CardEntry | string {
  const form = new URLSearchParams(body);
  const value = (name: string): string => (form.get(name) ?? '').trim();
  const until = expiry(value('expiry'), now);
  if (!value('number')) return 'Enter the card number.';
  if (!until) return 'Enter when the card expires, as month / year, in the future.';
  if (!/^\d{3,4}$/.test(value('cvc'))) return 'Enter the security code of three or four digits.';
  if (!value('name')) return 'Enter the name on the card.';
  return { number: value('number'), ...until, name: value('name'), email: value('email') };
}

function pay(call: Call, session: Thing, body: string): Answer {
  const entry = entered(body, call.now);
  if (typeof entry === 'string') return cardPage(session, entry);
  try {
    const result = payWithCard(call, session, entry);
    if (result.refusal) return cardPage(result.session, result.refusal);
    return seeOther(successAddress(result.session));
  } catch (error) {
    if (error instanceof ApiError) return cardPage(session, error.message);
    throw error;
  }
}

function checkout(call: Call, method: string, body: string): Answer {
  const session = current(call, call.ids[0]);
  // A second submit, or the back button, must not charge again.
  if (session.status === 'complete') return seeOther(successAddress(session));
  if (session.status === 'expired') return endedPage(session);
  return method === 'POST' ? pay(call, session, body) : cardPage(session);
}

function overview(fake: Fake): Answer {
  const payments = fake.books
    .accountIds()
    .flatMap((account) =>
      fake.books.all(account, 'payment_intent').map((intent) => ({ account, intent })),
    )
    .sort((a, b) => b.intent.created - a.intent.created);
  return overviewPage(payments.slice(0, 100));
}

/** The pages that people see: the card page above all. */
export function pageAnswer(fake: Fake, method: string, url: URL, body: string): Answer {
  try {
    if (url.pathname === '/') return overview(fake);
    const session = /^\/checkout\/([^/]+)\/([^/]+)$/.exec(url.pathname);
    if (session) {
      const account = session[1] === 'platform' ? platform : (session[1] ?? '');
      return checkout(fake.call(account, [session[2] ?? '']), method, body);
    }
    const onboarding = /^\/onboarding\/([^/]+)$/.exec(url.pathname);
    if (onboarding) {
      const call = fake.call(platform, [onboarding[1] ?? '']);
      if (method === 'POST') {
        finishOnboarding(call);
        return seeOther(url.searchParams.get('return') ?? '/');
      }
      const account = fake.books.get(platform, onboarding[1] ?? '');
      return account ? onboardingPage(account) : absentPage();
    }
    return absentPage();
  } catch (error) {
    if (error instanceof ApiError && error.status === 404) return absentPage();
    throw error;
  }
}
