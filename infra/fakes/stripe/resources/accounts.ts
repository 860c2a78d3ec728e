import { platform, type Thing } from '../books';
import {
  type Call,
  change,
  metadata,
  newId,
  paged,
  record,
  required,
  type Route,
  text,
} from '../call';
import { invalid, noSuch } from '../errors';

// Connected accounts belong to the platform, whatever account the request is made for.
function accountOf(call: Call, id: string | undefined): Thing {
  const thing = id === undefined ? undefined : call.books.get(platform, id);
  if (thing?.object !== 'account') throw noSuch('account', id ?? '');
  return thing;
}

const onPlatform = (call: Call): Call => ({ ...call, account: platform });

function capabilities(asked: Record<string, unknown>, state: string): Record<string, string> {
  return Object.fromEntries(Object.keys(asked).map((name) => [name, state]));
}

function create(call: Call): Thing {
  const country = text(call, 'country') ?? 'US';
  const currencies: Record<string, string> = { US: 'usd', GB: 'gbp', CA: 'cad', CH: 'chf' };
  const asked = record(call.params.capabilities);
  const wanted = Object.keys(asked).length ? asked : { card_payments: {}, transfers: {} };
  // A real account must first be onboarded; this one may do so at once, unless a test asks.
  const ready = metadata(call.params.metadata).onboarding !== 'later';
  return call.books.put(platform, {
    id: newId('acct'),
    object: 'account',
    created: call.now,
    type: text(call, 'type') ?? 'none',
    country,
    default_currency: text(call, 'default_currency') ?? currencies[country] ?? 'eur',
    email: text(call, 'email') ?? null,
    business_type: text(call, 'business_type') ?? null,
    business_profile: { name: null, url: null, ...record(call.params.business_profile) },
    capabilities: capabilities(wanted, ready ? 'active' : 'inactive'),
    charges_enabled: ready,
    payouts_enabled: ready,
    details_submitted: ready,
    controller: { type: 'application', is_controller: true, ...record(call.params.controller) },
    requirements: {
      currently_due: ready ? [] : ['external_account'],
      eventually_due: [],
      past_due: [],
      disabled_reason: ready ? null : 'requirements.past_due',
    },
    metadata: metadata(call.params.metadata),
  });
}

function retrieve(call: Call): Thing {
  return accountOf(call, call.ids[0] ?? (call.account || undefined));
}

function update(call: Call): Thing {
  const account = accountOf(call, call.ids[0]);
  return change(onPlatform(call), account, {
    email: text(call, 'email') ?? account.email,
    metadata: metadata(call.params.metadata, account.metadata),
  });
}

/** What the last page of onboarding does. */
export function finishOnboarding(call: Call): Thing {
  const account = accountOf(call, call.ids[0]);
  const done = change(onPlatform(call), account, {
    charges_enabled: true,
    payouts_enabled: true,
    details_submitted: true,
    capabilities: capabilities(record(account.capabilities as never), 'active'),
    requirements: { currently_due: [], eventually_due: [], past_due: [], disabled_reason: null },
  });
  call.emit('account.updated', done);
  return done;
}

function link(call: Call): Record<string, unknown> {
  const account = accountOf(call, required(call, 'account'));
  const back = text(call, 'return_url');
  if (!back || !URL.canParse(back)) throw invalid('Not a valid URL', 'url_invalid', 'return_url');
  return {
    object: 'account_link',
    created: call.now,
    expires_at: call.now + 300,
    url: `${call.url}/onboarding/${account.id}?return=${encodeURIComponent(back)}`,
  };
}

export const accountRoutes: Route[] = [
  ['POST', '/v1/accounts', create],
  ['GET', '/v1/accounts', (call) => paged(call, call.books.all(platform, 'account'))],
  ['GET', '/v1/account', retrieve],
  ['GET', '/v1/accounts/:', retrieve],
  ['POST', '/v1/accounts/:', update],
  ['POST', '/v1/account_links', link],
];
