import { type Answer, json } from '../http';
import { parsedBody, refuse, type RequestMode, requestModes } from './control';
import { ApiError } from './errors';
import { finishOnboarding } from './resources/accounts';
import { advance } from './resources/subscriptions';
import { type Fake } from './stripe-fake';
import { type WebhookMode, webhookModes } from './webhooks';

function webhookMode(fake: Fake, body: string): Answer {
  const mode = parsedBody<{ mode?: WebhookMode }>(body)?.mode;
  if (!mode || !webhookModes.includes(mode)) {
    return refuse(`mode is one of ${webhookModes.join(', ')}`);
  }
  fake.webhooks.setMode(mode);
  return json({ mode });
}

function requestMode(fake: Fake, body: string): Answer {
  const asked = parsedBody<{ mode?: RequestMode; times?: number; path?: string }>(body);
  if (!asked?.mode || !requestModes.includes(asked.mode)) {
    return refuse(`mode is one of ${requestModes.join(', ')}`);
  }
  fake.traffic.set(asked.mode, asked.times, asked.path);
  return json({ mode: asked.mode });
}

function attempt(work: () => unknown): Answer {
  try {
    return json(work());
  } catch (error) {
    if (error instanceof ApiError) return json({ error: error.body }, error.status);
    throw error;
  }
}

/** What tests and people at the keyboard may tell the fake; nothing of it exists in the API. */
export async function controlAnswer(
  fake: Fake,
  method: string,
  url: URL,
  body: string,
): Promise<Answer> {
  const route = `${method} ${url.pathname}`;
  if (route === 'GET /fake/requests') return json(fake.traffic.seen);
  if (route === 'DELETE /fake/requests') {
    fake.traffic.seen.length = 0;
    return { status: 204 };
  }
  if (route === 'POST /fake/webhooks/mode') return webhookMode(fake, body);
  if (route === 'POST /fake/webhooks/flush') {
    await fake.webhooks.flush();
    return json({ waiting: fake.webhooks.waiting });
  }
  if (route === 'GET /fake/webhooks') return json({ waiting: fake.webhooks.waiting });
  if (route === 'POST /fake/requests/mode') return requestMode(fake, body);
  const account = url.searchParams.get('account') ?? '';
  const period = /^POST \/fake\/subscriptions\/([^/]+)\/advance$/.exec(route);
  if (period) return attempt(() => advance(fake.call(account, [period[1] ?? ''])));
  const onboard = /^POST \/fake\/accounts\/([^/]+)\/finish$/.exec(route);
  if (onboard) return attempt(() => finishOnboarding(fake.call('', [onboard[1] ?? ''])));
  return json({ error: 'there is no such control' }, 404);
}
