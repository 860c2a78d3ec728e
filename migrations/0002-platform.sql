-- Shops, what they pay the platform for, people, and how they sign in.

create table plans (
  id uuid primary key,
  code text not null unique,
  name text not null,
  monthly_amount bigint not null check (monthly_amount >= 0),
  currency text not null,
  store_limit integer not null,
  machine_limit integer not null,
  crew_limit integer not null,
  trial_days integer not null default 30,
  grace_days integer not null default 14,
  offered boolean not null default true,
  card_price text,
  version integer not null default 1,
  created_at timestamptz not null default now(),
  updated_at timestamptz not null default now()
);
select app.versioned('plans');
grant select, insert, update on plans to tw_platform;
grant select on plans to tw_app;

create table shops (
  id uuid primary key,
  name text not null,
  zone text not null,
  currency text not null,
  locale text not null default 'en-US',
  -- The shop's connected account at the card payment service: where its clients' money goes.
  card_account text unique,
  version integer not null default 1,
  created_at timestamptz not null default now(),
  updated_at timestamptz not null default now()
);
select app.versioned('shops');
create index shops_by_name on shops (name, id);
alter table shops enable row level security;
alter table shops force row level security;
create policy tenant on shops to tw_app using (id = (select app.shop())) with check (id = (select app.shop()));
create policy platform on shops to tw_platform using (true) with check (true);
grant select, update on shops to tw_app;
grant select, insert, update on shops to tw_platform;

create table subscriptions (
  shop_id uuid not null references shops (id),
  id uuid not null,
  plan_id uuid not null references plans (id),
  state text not null check (state in ('trialing', 'active', 'past_due', 'paused', 'canceled')),
  state_since timestamptz not null,
  trial_ends_at timestamptz,
  current_period_ends_at timestamptz,
  card_customer text,
  card_subscription text unique,
  -- A card page somebody was sent to and whose end we have not heard of; the sweep asks after it.
  card_checkout text,
  card_checked_at timestamptz,
  version integer not null default 1,
  created_at timestamptz not null default now(),
  updated_at timestamptz not null default now(),
  primary key (shop_id, id),
  unique (shop_id)
);
select app.versioned('subscriptions');
select app.protect('subscriptions', 'all');
revoke insert, update, delete on subscriptions from tw_app;
select app.open_to_platform('subscriptions');
create index subscriptions_by_state on subscriptions (state, shop_id);

create table subscription_events (
  shop_id uuid not null references shops (id),
  id uuid not null,
  at timestamptz not null default now(),
  event text not null,
  from_state text,
  to_state text,
  note text,
  by_user_id uuid,
  primary key (shop_id, id)
);
select app.protect('subscription_events', 'shop');
select app.open_to_platform('subscription_events');
select app.append_only('subscription_events');

-- What a shop uses of its plan, written by the shop's own transactions, so that the platform area
-- can show it without a grant on business tables.
create table shop_usage (
  shop_id uuid not null references shops (id),
  id uuid not null,
  stores integer not null default 0,
  machines integer not null default 0,
  crew integer not null default 0,
  counted_at timestamptz not null default now(),
  primary key (shop_id, id),
  unique (shop_id)
);
select app.protect('shop_usage', 'all');
select app.open_to_platform('shop_usage');

create table users (
  id uuid primary key,
  email text not null unique,
  name text not null,
  password_hash text,
  email_verified_at timestamptz,
  platform_admin boolean not null default false,
  totp_secret text,
  totp_confirmed_at timestamptz,
  -- The last time step a code was taken for: a code is good once (RFC 6238, 5.2).
  totp_last_step bigint,
  version integer not null default 1,
  created_at timestamptz not null default now(),
  updated_at timestamptz not null default now()
);
select app.versioned('users');
grant select, insert, update on users to tw_platform;

create table memberships (
  shop_id uuid not null references shops (id),
  id uuid not null,
  user_id uuid not null references users (id),
  role text not null check (role in ('shop_owner', 'office', 'tech', 'client_owner', 'attendant')),
  client_id uuid,
  store_id uuid,
  -- As the shop knows the person: the shop's own role cannot read the people of other shops.
  name text not null,
  email text not null,
  ended_at timestamptz,
  version integer not null default 1,
  created_at timestamptz not null default now(),
  updated_at timestamptz not null default now(),
  primary key (shop_id, id),
  check ((role in ('client_owner', 'attendant')) = (client_id is not null)),
  check ((role = 'attendant') = (store_id is not null))
);
create unique index memberships_once on memberships
  (shop_id, user_id, role, coalesce(client_id, shop_id), coalesce(store_id, shop_id)) where ended_at is null;
create index memberships_of_user on memberships (user_id);
create index memberships_by_name on memberships (shop_id, name, id);
select app.versioned('memberships');
select app.protect('memberships', 'shop');
select app.open_to_platform('memberships');

create table invitations (
  shop_id uuid not null references shops (id),
  id uuid not null,
  email text not null,
  name text not null,
  role text not null check (role in ('shop_owner', 'office', 'tech', 'client_owner', 'attendant')),
  client_id uuid,
  store_id uuid,
  client_name text,
  token_hash text not null unique,
  expires_at timestamptz not null,
  accepted_at timestamptz,
  withdrawn_at timestamptz,
  invited_by uuid not null,
  -- How often it was mailed: each time is a mail of its own.
  mailed integer not null default 1,
  created_at timestamptz not null default now(),
  primary key (shop_id, id)
);
select app.protect('invitations', 'shop');
select app.open_to_platform('invitations');
create index invitations_newest on invitations (shop_id, created_at desc, id);

-- A device's chain of refresh tokens. A used token that comes back ends the whole chain.
create table sessions (
  id uuid primary key,
  user_id uuid not null references users (id),
  -- What the person works as on this device; without one a platform admin is in the platform area.
  shop_id uuid,
  membership_id uuid,
  device text not null,
  started_at timestamptz not null default now(),
  last_used_at timestamptz not null default now(),
  expires_at timestamptz not null,
  ended_at timestamptz,
  ended_because text
);
create index sessions_of_user on sessions (user_id, last_used_at desc);
grant select, insert, update on sessions to tw_platform;

create table refresh_tokens (
  token_hash text primary key,
  session_id uuid not null references sessions (id) on delete cascade,
  created_at timestamptz not null default now(),
  used_at timestamptz,
  -- The hash of the key the browser made for this trade: with it, and only with it, a browser whose
  -- answer got lost may ask again.
  asked_with text
);
create index refresh_tokens_of_session on refresh_tokens (session_id);
grant select, insert, update, delete on refresh_tokens to tw_platform;

create table mailed_tokens (
  token_hash text primary key,
  id uuid not null unique,
  user_id uuid not null references users (id),
  purpose text not null check (purpose in ('reset_password')),
  expires_at timestamptz not null,
  used_at timestamptz,
  created_at timestamptz not null default now()
);
create index mailed_tokens_of_user on mailed_tokens (user_id);
grant select, insert, update on mailed_tokens to tw_platform;

-- A shop somebody asked to open. Nothing of it exists until the address is confirmed, so nobody can
-- take an address that is not theirs, and a sign-up looks the same whether the address is known.
create table sign_ups (
  id uuid primary key,
  token_hash text not null unique,
  email text not null,
  name text not null,
  password_hash text not null,
  shop_name text not null,
  zone text not null,
  currency text not null,
  locale text not null,
  expires_at timestamptz not null,
  confirmed_at timestamptz,
  opened_shop_id uuid,
  created_at timestamptz not null default now()
);
create index sign_ups_oldest on sign_ups (expires_at);
grant select, insert, update, delete on sign_ups to tw_platform;

-- Failed sign-ins, counted per address and source together, so that guessing from one place never
-- locks out the person at another (docs/decisions/0005-sign-in.md). Addresses are kept as hashes.
create table sign_in_failures (
  email_hash text not null,
  source_hash text not null,
  failures integer not null,
  last_at timestamptz not null,
  primary key (email_hash, source_hash)
);
grant select, insert, update, delete on sign_in_failures to tw_platform;

-- A shop lets the platform's support read its data until a time.
create table consents (
  shop_id uuid not null references shops (id),
  id uuid not null,
  given_by uuid not null,
  until timestamptz not null,
  withdrawn_at timestamptz,
  created_at timestamptz not null default now(),
  primary key (shop_id, id)
);
select app.protect('consents', 'shop');
select app.open_to_platform('consents');

create table audit (
  shop_id uuid not null references shops (id),
  id uuid not null,
  at timestamptz not null default now(),
  by_user_id uuid,
  by_name text,
  what text not null,
  subject_kind text,
  subject_id uuid,
  details jsonb not null default '{}',
  request_id text,
  primary key (shop_id, id)
);
create index audit_newest on audit (shop_id, at desc, id desc);
select app.protect('audit', 'shop');
-- What a client's person does in the shop is written down too, though they cannot read it.
create policy tenant_insert on audit for insert to tw_app with check (shop_id = (select app.shop()));
select app.append_only('audit');

create table platform_audit (
  id uuid primary key,
  at timestamptz not null default now(),
  by_user_id uuid,
  by_name text,
  what text not null,
  subject_shop_id uuid,
  details jsonb not null default '{}',
  request_id text
);
create index platform_audit_newest on platform_audit (at desc, id desc);
grant select, insert on platform_audit to tw_platform;
select app.append_only('platform_audit');

-- Events of the card payment service: verified, stored by their id, answered, then worked.
create table stripe_events (
  id text primary key,
  account text,
  type text not null,
  object_id text,
  payload jsonb not null,
  received_at timestamptz not null default now(),
  worked_at timestamptz,
  attempts integer not null default 0,
  last_error text
);
create index stripe_events_waiting on stripe_events (received_at) where worked_at is null;
create index stripe_events_newest on stripe_events (received_at desc, id);
grant select, insert, update on stripe_events to tw_platform;

-- Mail of sign-in and the platform. Links are made from the token's id when the mail is sent, so
-- no secret rests here.
create table platform_mails (
  id uuid primary key,
  shop_id uuid,
  recipient text not null,
  template text not null,
  params jsonb not null default '{}',
  dedupe_key text not null unique,
  message_id text not null unique,
  state text not null default 'waiting' check (state in ('waiting', 'handing_over', 'sent', 'failed', 'uncertain')),
  attempt integer not null default 0,
  lease_until timestamptz,
  next_attempt_at timestamptz not null default now(),
  last_error text,
  sent_at timestamptz,
  created_at timestamptz not null default now()
);
create index platform_mails_due on platform_mails (next_attempt_at) where state in ('waiting', 'handing_over');
create index platform_mails_newest on platform_mails (created_at desc, id desc);
grant select, insert, update on platform_mails to tw_platform;
-- An invitation and its mail are written together by the shop, which can add a mail and read none.
grant insert on platform_mails to tw_app;

create table idempotency_keys (
  shop_id uuid not null references shops (id),
  id uuid not null,
  membership_id uuid not null,
  key text not null,
  operation text not null,
  fingerprint text not null,
  status integer,
  -- Not jsonb: a repeat gets the first answer letter for letter.
  answer json,
  created_at timestamptz not null default now(),
  primary key (shop_id, id),
  unique (shop_id, membership_id, key)
);
create index idempotency_keys_oldest on idempotency_keys (shop_id, created_at);
select app.protect('idempotency_keys', 'all');
