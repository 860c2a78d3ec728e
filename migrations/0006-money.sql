-- Contracts and their rounds, the ledger, statements, how they were delivered, and payments.

create table contracts (
  shop_id uuid not null references shops (id),
  id uuid not null,
  client_id uuid not null,
  number bigint not null,
  name text not null,
  rule text not null,
  starts_on date not null,
  ends_on date,
  start_time text not null default '09:00',
  shift text not null default 'next' check (shift in ('next', 'previous', 'none')),
  coverage jsonb not null default '{}',
  tech_membership_id uuid,
  ended_at timestamptz,
  version integer not null default 1,
  created_at timestamptz not null default now(),
  updated_at timestamptz not null default now(),
  primary key (shop_id, id),
  unique (shop_id, number),
  foreign key (shop_id, client_id) references clients (shop_id, id),
  foreign key (shop_id, tech_membership_id) references memberships (shop_id, id)
);
create index contracts_by_name on contracts (shop_id, name, id);
create index contracts_of_client on contracts (shop_id, client_id, name, id);
select app.versioned('contracts');
select app.protect('contracts', 'client');

create table contract_stores (
  shop_id uuid not null references shops (id),
  id uuid not null,
  client_id uuid not null,
  contract_id uuid not null,
  store_id uuid not null,
  monthly_fee bigint not null check (monthly_fee >= 0),
  primary key (shop_id, id),
  unique (shop_id, contract_id, store_id),
  foreign key (shop_id, client_id) references clients (shop_id, id),
  foreign key (shop_id, contract_id) references contracts (shop_id, id),
  foreign key (shop_id, store_id) references stores (shop_id, id)
);
create index contract_stores_of_store on contract_stores (shop_id, store_id);
select app.protect('contract_stores', 'client');

-- When the shop is closed: a round that falls on such a day is shifted.
create table closures (
  shop_id uuid not null references shops (id),
  id uuid not null,
  -- 1 is Monday, 7 Sunday.
  weekdays jsonb not null default '[]',
  days jsonb not null default '[]',
  version integer not null default 1,
  created_at timestamptz not null default now(),
  updated_at timestamptz not null default now(),
  primary key (shop_id, id),
  unique (shop_id)
);
select app.versioned('closures');
select app.protect('closures', 'all');

create table rounds (
  shop_id uuid not null references shops (id),
  id uuid not null,
  client_id uuid not null,
  contract_id uuid not null,
  store_id uuid not null,
  -- The day the rule gives; the natural key, whatever day the round is shifted to.
  due_on date not null,
  planned_on date not null,
  visit_id uuid,
  state text not null default 'planned' check (state in ('planned', 'done', 'skipped')),
  created_at timestamptz not null default now(),
  primary key (shop_id, id),
  unique (shop_id, contract_id, store_id, due_on),
  foreign key (shop_id, client_id) references clients (shop_id, id),
  foreign key (shop_id, contract_id) references contracts (shop_id, id),
  foreign key (shop_id, store_id) references stores (shop_id, id),
  foreign key (shop_id, visit_id) references visits (shop_id, id)
);
create index rounds_by_day on rounds (shop_id, planned_on, id);
select app.protect('rounds', 'client');
alter table visits add foreign key (shop_id, round_id) references rounds (shop_id, id);

-- A contract's fee for a month, and charges for lateness: what the close itself adds.
create table fees (
  shop_id uuid not null references shops (id),
  id uuid not null,
  client_id uuid not null,
  store_id uuid not null,
  contract_id uuid,
  kind text not null check (kind in ('fee', 'late_charge')),
  month text not null,
  words text not null,
  net bigint not null,
  tax_basis_points double precision not null default 0,
  tax bigint not null default 0,
  total bigint not null,
  natural_key text not null,
  created_at timestamptz not null default now(),
  primary key (shop_id, id),
  unique (shop_id, natural_key),
  foreign key (shop_id, client_id) references clients (shop_id, id),
  foreign key (shop_id, store_id) references stores (shop_id, id),
  foreign key (shop_id, contract_id) references contracts (shop_id, id),
  check (total = net + tax)
);
create index fees_of_store on fees (shop_id, store_id, month);
select app.protect('fees', 'client');
select app.append_only('fees');

create table entries (
  shop_id uuid not null references shops (id),
  id uuid not null,
  document_kind text not null check (document_kind in
    ('ticket', 'absorbed', 'fee', 'late_charge', 'statement', 'payment', 'refund', 'credit_note', 'write_off')),
  document_id uuid not null,
  line_no integer not null,
  account text not null,
  client_id uuid,
  store_id uuid,
  -- Debit positive, credit negative; minor units of the shop's currency.
  amount bigint not null,
  posted_on date not null,
  at timestamptz not null default now(),
  primary key (shop_id, id),
  -- A document is posted once, whoever tries it twice.
  unique (shop_id, document_kind, document_id, line_no),
  foreign key (shop_id, client_id) references clients (shop_id, id),
  foreign key (shop_id, store_id) references stores (shop_id, id)
);
create index entries_of_store on entries (shop_id, store_id, account, posted_on);
create index entries_by_day on entries (shop_id, posted_on desc, id desc);
select app.protect('entries', 'client');
select app.append_only('entries');

create function app.document_balances() returns trigger language plpgsql as $$
begin
  if (select sum(amount) from entries
      where shop_id = new.shop_id and document_kind = new.document_kind and document_id = new.document_id) <> 0
  then
    raise exception 'the postings of % % do not sum to zero', new.document_kind, new.document_id
      using errcode = 'check_violation';
  end if;
  return null;
end $$;
create constraint trigger document_balances after insert on entries
  deferrable initially deferred for each row execute function app.document_balances();

create table statement_runs (
  shop_id uuid not null references shops (id),
  id uuid not null,
  month text not null,
  revision integer not null default 1,
  state text not null check (state in ('building', 'sending', 'done', 'held', 'failed')),
  started_by uuid,
  started_at timestamptz not null default now(),
  finished_at timestamptz,
  problem text,
  version integer not null default 1,
  created_at timestamptz not null default now(),
  updated_at timestamptz not null default now(),
  primary key (shop_id, id),
  unique (shop_id, month, revision)
);
select app.versioned('statement_runs');
select app.protect('statement_runs', 'shop');

-- One row a store: what is still to do of a run, and by which attempt it is being done.
create table statement_run_stores (
  shop_id uuid not null references shops (id),
  id uuid not null,
  run_id uuid not null,
  store_id uuid not null,
  state text not null default 'waiting' check (state in ('waiting', 'built', 'rendered', 'failed')),
  statement_id uuid,
  attempt integer not null default 0,
  lease_until timestamptz,
  last_error text,
  primary key (shop_id, id),
  unique (shop_id, run_id, store_id),
  foreign key (shop_id, run_id) references statement_runs (shop_id, id),
  foreign key (shop_id, store_id) references stores (shop_id, id)
);
create index statement_run_stores_open on statement_run_stores (shop_id, run_id, state);
select app.protect('statement_run_stores', 'shop');

create table statements (
  shop_id uuid not null references shops (id),
  id uuid not null,
  client_id uuid not null,
  store_id uuid not null,
  run_id uuid not null,
  month text not null,
  revision integer not null default 1,
  number bigint not null,
  issued_on date not null,
  due_on date not null,
  currency text not null,
  opening bigint not null,
  charged bigint not null,
  tax bigint not null,
  paid bigint not null,
  borne_by_shop bigint not null,
  closing bigint not null,
  reference text not null,
  snapshot jsonb not null,
  sha256 text not null,
  created_at timestamptz not null default now(),
  primary key (shop_id, id),
  unique (shop_id, number),
  unique (shop_id, store_id, month, revision),
  unique (shop_id, reference),
  foreign key (shop_id, client_id) references clients (shop_id, id),
  foreign key (shop_id, store_id) references stores (shop_id, id),
  foreign key (shop_id, run_id) references statement_runs (shop_id, id),
  check (closing = opening + charged + tax - paid)
);
create index statements_newest on statements (shop_id, month desc, id desc);
create index statements_of_client on statements (shop_id, client_id, month desc, id desc);
create index statements_of_store on statements (shop_id, store_id, month desc, id desc);
create index statements_of_run on statements (shop_id, run_id);
select app.protect('statements', 'client');
select app.append_only('statements');
alter table statement_run_stores add foreign key (shop_id, statement_id) references statements (shop_id, id);

-- Every ticket and every fee stands on exactly one statement.
create table statement_documents (
  shop_id uuid not null references shops (id),
  statement_id uuid not null,
  client_id uuid not null,
  document_kind text not null check (document_kind in ('ticket', 'fee', 'late_charge', 'payment', 'refund', 'credit_note', 'write_off')),
  document_id uuid not null,
  primary key (shop_id, document_kind, document_id),
  foreign key (shop_id, statement_id) references statements (shop_id, id),
  foreign key (shop_id, client_id) references clients (shop_id, id)
);
create index statement_documents_of on statement_documents (shop_id, statement_id);
select app.protect('statement_documents', 'client');
select app.append_only('statement_documents');

create table deliveries (
  shop_id uuid not null references shops (id),
  id uuid not null,
  client_id uuid,
  kind text not null,
  statement_id uuid,
  contact_id uuid,
  recipient text not null,
  recipient_name text not null default '',
  subject text not null default '',
  params jsonb not null default '{}',
  dedupe_key text not null,
  message_id text not null,
  state text not null default 'waiting' check (state in ('waiting', 'handing_over', 'sent', 'failed', 'uncertain')),
  attempt integer not null default 0,
  lease_until timestamptz,
  next_attempt_at timestamptz not null default now(),
  last_error text,
  sent_at timestamptz,
  version integer not null default 1,
  created_at timestamptz not null default now(),
  updated_at timestamptz not null default now(),
  primary key (shop_id, id),
  unique (shop_id, dedupe_key),
  unique (shop_id, message_id),
  foreign key (shop_id, client_id) references clients (shop_id, id),
  foreign key (shop_id, statement_id) references statements (shop_id, id),
  foreign key (shop_id, contact_id) references contacts (shop_id, id)
);
create index deliveries_due on deliveries (shop_id, next_attempt_at) where state in ('waiting', 'handing_over');
create index deliveries_newest on deliveries (shop_id, created_at desc, id desc);
create index deliveries_of_statement on deliveries (shop_id, statement_id);
select app.versioned('deliveries');
select app.protect('deliveries', 'shop');

create table payments (
  shop_id uuid not null references shops (id),
  id uuid not null,
  client_id uuid not null,
  store_id uuid not null,
  number bigint,
  method text not null check (method in ('card', 'transfer', 'cheque', 'cash')),
  state text not null check (state in ('asked', 'succeeded', 'failed', 'expired')),
  amount bigint not null check (amount > 0),
  currency text not null,
  statement_id uuid,
  received_on date,
  words text not null default '',
  -- Ours, stored before the card payment service is called, so that a repeated call stays one payment.
  card_key text,
  card_session text,
  card_intent text,
  asked_by uuid,
  problem text,
  checked_at timestamptz,
  version integer not null default 1,
  created_at timestamptz not null default now(),
  updated_at timestamptz not null default now(),
  primary key (shop_id, id),
  unique (shop_id, number),
  unique (shop_id, card_key),
  unique (shop_id, card_session),
  foreign key (shop_id, client_id) references clients (shop_id, id),
  foreign key (shop_id, store_id) references stores (shop_id, id),
  foreign key (shop_id, statement_id) references statements (shop_id, id)
);
create index payments_newest on payments (shop_id, created_at desc, id desc);
create index payments_of_client on payments (shop_id, client_id, created_at desc, id desc);
create index payments_of_store on payments (shop_id, store_id, received_on);
create index payments_asked on payments (shop_id, created_at) where state = 'asked';
select app.versioned('payments');
select app.protect('payments', 'client');

-- Money given back, by the shop or after a dispute at the card payment service.
create table refunds (
  shop_id uuid not null references shops (id),
  id uuid not null,
  client_id uuid not null,
  store_id uuid not null,
  payment_id uuid not null,
  amount bigint not null check (amount > 0),
  refunded_on date not null,
  words text not null default '',
  -- The refund or dispute at the card payment service, so that its repeated word is one refund.
  card_refund text,
  at timestamptz not null default now(),
  primary key (shop_id, id),
  unique (shop_id, card_refund),
  foreign key (shop_id, client_id) references clients (shop_id, id),
  foreign key (shop_id, store_id) references stores (shop_id, id),
  foreign key (shop_id, payment_id) references payments (shop_id, id)
);
create index refunds_of_payment on refunds (shop_id, payment_id);
create index refunds_of_store on refunds (shop_id, store_id, refunded_on);
select app.protect('refunds', 'client');
select app.append_only('refunds');

-- What a payment settled; a refund takes back with a row below zero.
create table allocations (
  shop_id uuid not null references shops (id),
  id uuid not null,
  client_id uuid not null,
  payment_id uuid not null,
  statement_id uuid not null,
  refund_id uuid,
  amount bigint not null,
  at timestamptz not null default now(),
  primary key (shop_id, id),
  foreign key (shop_id, client_id) references clients (shop_id, id),
  foreign key (shop_id, payment_id) references payments (shop_id, id),
  foreign key (shop_id, statement_id) references statements (shop_id, id),
  foreign key (shop_id, refund_id) references refunds (shop_id, id),
  check (case when refund_id is null then amount > 0 else amount < 0 end)
);
create index allocations_of_statement on allocations (shop_id, statement_id);
create index allocations_of_payment on allocations (shop_id, payment_id);
select app.protect('allocations', 'client');
select app.append_only('allocations');
