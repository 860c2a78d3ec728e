-- The shop's own settings and crew, and its client laundries: stores, contacts, banks, machines.

create table shop_settings (
  shop_id uuid not null references shops (id),
  id uuid not null,
  address text not null default '',
  tax_number text not null default '',
  phone text not null default '',
  mail_name text not null default '',
  reply_to text,
  -- The day of the next month on which a month falls due to be closed, and the hour, in the shop's zone.
  statement_day integer not null default 1 check (statement_day between 1 and 28),
  statement_hour integer not null default 6 check (statement_hour between 0 and 23),
  close_by_schedule boolean not null default true,
  terms_days integer not null default 14 check (terms_days between 0 and 120),
  late_charge_basis_points integer not null default 0,
  late_charge_day_count text not null default 'actual_365' check (late_charge_day_count in ('actual_365', '30_360')),
  set_up_at timestamptz,
  version integer not null default 1,
  created_at timestamptz not null default now(),
  updated_at timestamptz not null default now(),
  primary key (shop_id, id),
  unique (shop_id)
);
select app.versioned('shop_settings');
select app.protect('shop_settings', 'all');

-- Document numbers without gaps: taken in the transaction that uses them.
create table counters (
  shop_id uuid not null references shops (id),
  kind text not null,
  value bigint not null default 0,
  primary key (shop_id, kind)
);
select app.protect('counters', 'all');

create table crew_profiles (
  shop_id uuid not null references shops (id),
  id uuid not null,
  membership_id uuid not null,
  initials text not null,
  van text not null default '',
  -- What an hour of this person costs the shop, for absorbed work; minor units.
  cost_per_hour bigint not null default 0,
  version integer not null default 1,
  created_at timestamptz not null default now(),
  updated_at timestamptz not null default now(),
  primary key (shop_id, id),
  unique (shop_id, membership_id),
  foreign key (shop_id, membership_id) references memberships (shop_id, id)
);
select app.versioned('crew_profiles');
select app.protect('crew_profiles', 'shop');

create table clients (
  shop_id uuid not null references shops (id),
  id uuid not null,
  client_id uuid not null generated always as (id) stored,
  name text not null,
  number text not null,
  terms_days integer,
  tax_exempt boolean not null default false,
  tax_exempt_reference text not null default '',
  -- Departures from the price book for this client, checked by the contract.
  overrides jsonb not null default '{}',
  note text not null default '',
  ended_at timestamptz,
  version integer not null default 1,
  created_at timestamptz not null default now(),
  updated_at timestamptz not null default now(),
  primary key (shop_id, id),
  unique (shop_id, number)
);
create index clients_by_name on clients (shop_id, name, id);
select app.versioned('clients');
select app.protect('clients', 'client');

create table stores (
  shop_id uuid not null references shops (id),
  id uuid not null,
  client_id uuid not null,
  name text not null,
  number text not null,
  address text not null default '',
  zone text,
  hours text not null default '',
  access_words text not null default '',
  -- Which rates apply: the tax place and the trip place of the price book.
  tax_place text not null default '',
  trip_place text not null default '',
  trip_metres integer check (trip_metres >= 0),
  card_value bigint not null default 0,
  ended_at timestamptz,
  version integer not null default 1,
  created_at timestamptz not null default now(),
  updated_at timestamptz not null default now(),
  primary key (shop_id, id),
  unique (shop_id, number),
  foreign key (shop_id, client_id) references clients (shop_id, id)
);
create index stores_by_name on stores (shop_id, name, id);
create index stores_of_client on stores (shop_id, client_id, name, id);
select app.versioned('stores');
select app.protect('stores', 'client');

-- From here on memberships can point at a client and a store of the same shop only.
alter table memberships
  add foreign key (shop_id, client_id) references clients (shop_id, id),
  add foreign key (shop_id, store_id) references stores (shop_id, id);
alter table invitations
  add foreign key (shop_id, client_id) references clients (shop_id, id),
  add foreign key (shop_id, store_id) references stores (shop_id, id);

create table contacts (
  shop_id uuid not null references shops (id),
  id uuid not null,
  client_id uuid not null,
  store_id uuid,
  name text not null,
  email text,
  phone text,
  gets_statements boolean not null default false,
  gets_visits boolean not null default false,
  ended_at timestamptz,
  version integer not null default 1,
  created_at timestamptz not null default now(),
  updated_at timestamptz not null default now(),
  primary key (shop_id, id),
  foreign key (shop_id, client_id) references clients (shop_id, id),
  foreign key (shop_id, store_id) references stores (shop_id, id),
  check (email is not null or not (gets_statements or gets_visits))
);
create index contacts_of_client on contacts (shop_id, client_id, name, id);
create index contacts_by_name on contacts (shop_id, name, id);
create index contacts_of_store on contacts (shop_id, store_id, name, id);
select app.versioned('contacts');
select app.protect('contacts', 'client');

create table banks (
  shop_id uuid not null references shops (id),
  id uuid not null,
  client_id uuid not null,
  store_id uuid not null,
  letter text not null,
  words text not null default '',
  version integer not null default 1,
  created_at timestamptz not null default now(),
  updated_at timestamptz not null default now(),
  primary key (shop_id, id),
  unique (shop_id, store_id, letter),
  foreign key (shop_id, client_id) references clients (shop_id, id),
  foreign key (shop_id, store_id) references stores (shop_id, id)
);
select app.versioned('banks');
select app.protect('banks', 'client');

create table machines (
  shop_id uuid not null references shops (id),
  id uuid not null,
  client_id uuid not null,
  store_id uuid not null,
  bank_id uuid not null,
  -- The place as people say it, B-07: bank B, seventh.
  bay text not null,
  bay_number integer not null,
  kind text not null check (kind in ('top_loader', 'front_loader', 'dryer', 'stacked_pair', 'extractor', 'changer', 'heater')),
  energy text not null default 'electric' check (energy in ('electric', 'gas', 'steam')),
  make text not null default '',
  model text not null default '',
  serial text not null default '',
  built_on date,
  installed_on date,
  volts integer,
  amps numeric(6, 2),
  vend_price bigint not null default 0,
  cycles_a_day numeric(5, 1) not null default 0,
  state text not null default 'up' check (state in ('up', 'degraded', 'down', 'locked_out', 'retired')),
  state_since timestamptz not null default now(),
  sticker_code text not null,
  supplier_warranty_until date,
  note text not null default '',
  version integer not null default 1,
  created_at timestamptz not null default now(),
  updated_at timestamptz not null default now(),
  primary key (shop_id, id),
  unique (shop_id, sticker_code),
  foreign key (shop_id, client_id) references clients (shop_id, id),
  foreign key (shop_id, store_id) references stores (shop_id, id),
  foreign key (shop_id, bank_id) references banks (shop_id, id)
);
create unique index machines_one_a_bay on machines (shop_id, store_id, bay) where state <> 'retired';
create index machines_of_store on machines (shop_id, store_id, bay, id);
create index machines_of_client on machines (shop_id, client_id, bay, id);
create index machines_of_bank on machines (shop_id, bank_id, bay_number);
create index machines_by_bay on machines (shop_id, bay, id);
create index machines_by_serial on machines (shop_id, serial, id);
create index machines_by_state on machines (shop_id, state_since desc, id desc);
create index machines_not_up on machines (shop_id, client_id, store_id) where state in ('degraded', 'down', 'locked_out');
select app.versioned('machines');
select app.protect('machines', 'client');

create table conditions (
  shop_id uuid not null references shops (id),
  id uuid not null,
  client_id uuid not null,
  store_id uuid not null,
  machine_id uuid,
  kind text not null check (kind in ('access', 'supply', 'hazard')),
  words text not null,
  extra_minutes integer not null default 0,
  tool text not null default '',
  cleared_at timestamptz,
  version integer not null default 1,
  created_at timestamptz not null default now(),
  updated_at timestamptz not null default now(),
  primary key (shop_id, id),
  foreign key (shop_id, client_id) references clients (shop_id, id),
  foreign key (shop_id, store_id) references stores (shop_id, id),
  foreign key (shop_id, machine_id) references machines (shop_id, id)
);
create index conditions_of_store on conditions (shop_id, store_id) where cleared_at is null;
select app.versioned('conditions');
select app.protect('conditions', 'client');

-- A file somebody added: a photo of a job, a rendered statement, an imported list. The bytes are in
-- the file store under their hash.
create table attachments (
  shop_id uuid not null references shops (id),
  id uuid not null,
  client_id uuid,
  owner_kind text not null,
  owner_id uuid not null,
  name text not null,
  content_type text not null,
  bytes bigint not null,
  sha256 text not null,
  -- A photo made small for lists.
  small_sha256 text,
  added_by uuid,
  created_at timestamptz not null default now(),
  primary key (shop_id, id),
  foreign key (shop_id, client_id) references clients (shop_id, id)
);
create index attachments_of_owner on attachments (shop_id, owner_kind, owner_id);
select app.protect('attachments', 'client');

create table imports (
  shop_id uuid not null references shops (id),
  id uuid not null,
  kind text not null,
  file_name text not null,
  sha256 text not null,
  state text not null check (state in ('waiting', 'checking', 'checked', 'applying', 'applied', 'failed', 'discarded')),
  rows_total integer not null default 0,
  rows_done integer not null default 0,
  count_new integer not null default 0,
  count_changed integer not null default 0,
  count_unchanged integer not null default 0,
  count_bad integer not null default 0,
  problem text,
  by_user_id uuid not null,
  -- What the check found, as a hash: what is applied must be what the person was shown.
  plan_sha256 text,
  attempt integer not null default 0,
  lease_until timestamptz,
  version integer not null default 1,
  created_at timestamptz not null default now(),
  updated_at timestamptz not null default now(),
  primary key (shop_id, id)
);
create index imports_open on imports (shop_id, id) where state in ('waiting', 'checking', 'applying');
create index imports_newest on imports (shop_id, created_at desc, id desc);
select app.versioned('imports');
select app.protect('imports', 'shop');

create table import_rows (
  shop_id uuid not null references shops (id),
  import_id uuid not null,
  row_number integer not null,
  outcome text not null check (outcome in ('new', 'changed', 'unchanged', 'bad')),
  label text not null,
  details jsonb not null,
  primary key (shop_id, import_id, row_number),
  foreign key (shop_id, import_id) references imports (shop_id, id) on delete cascade
);
create index import_rows_by_outcome on import_rows (shop_id, import_id, outcome, row_number);
select app.protect('import_rows', 'shop');
