-- Calls, visits as series of acts, and what is projected from them; rulings and tickets.

create table calls (
  shop_id uuid not null references shops (id),
  id uuid not null,
  client_id uuid not null,
  store_id uuid not null,
  machine_id uuid,
  number bigint not null,
  symptom text not null,
  words text not null default '',
  reported_by text not null,
  reported_via text not null check (reported_via in ('office', 'tech', 'client', 'sticker')),
  state text not null default 'open' check (state in ('open', 'planned', 'closed', 'withdrawn')),
  visit_id uuid,
  planned_at timestamptz,
  closed_at timestamptz,
  version integer not null default 1,
  created_at timestamptz not null default now(),
  updated_at timestamptz not null default now(),
  primary key (shop_id, id),
  unique (shop_id, number),
  foreign key (shop_id, client_id) references clients (shop_id, id),
  foreign key (shop_id, store_id) references stores (shop_id, id),
  foreign key (shop_id, machine_id) references machines (shop_id, id)
);
create index calls_newest on calls (shop_id, created_at desc, id desc);
create index calls_by_state on calls (shop_id, state, created_at desc, id desc);
create index calls_of_client on calls (shop_id, client_id, created_at desc, id desc);
create index calls_of_store on calls (shop_id, store_id, created_at desc, id desc);
create index calls_of_machine on calls (shop_id, machine_id, created_at desc);
select app.versioned('calls');
select app.protect('calls', 'client');

create table visits (
  shop_id uuid not null references shops (id),
  id uuid not null,
  client_id uuid not null,
  store_id uuid not null,
  number bigint not null,
  tech_membership_id uuid,
  planned_on date not null,
  window_start timestamptz,
  window_end timestamptz,
  state text not null default 'planned' check (state in ('planned', 'confirmed', 'in_process', 'completed', 'cancelled')),
  reason text not null default '',
  round_id uuid,
  confirmed_at timestamptz,
  arrived_at timestamptz,
  left_at timestamptz,
  completed_at timestamptz,
  received_by text,
  ticket_id uuid,
  version integer not null default 1,
  created_at timestamptz not null default now(),
  updated_at timestamptz not null default now(),
  primary key (shop_id, id),
  unique (shop_id, number),
  foreign key (shop_id, client_id) references clients (shop_id, id),
  foreign key (shop_id, store_id) references stores (shop_id, id),
  foreign key (shop_id, tech_membership_id) references memberships (shop_id, id)
);
create index visits_by_day on visits (shop_id, planned_on desc, id desc);
create index visits_of_tech on visits (shop_id, tech_membership_id, planned_on desc, id desc);
create index visits_of_store on visits (shop_id, store_id, planned_on desc, id desc);
create index visits_of_client on visits (shop_id, client_id, planned_on desc, id desc);
create index visits_unticketed on visits (shop_id, state, planned_on desc, id desc) where ticket_id is null;
select app.versioned('visits');
select app.protect('visits', 'client');
alter table calls add foreign key (shop_id, visit_id) references visits (shop_id, id);
create index calls_of_visit on calls (shop_id, visit_id);

create table acts (
  shop_id uuid not null references shops (id),
  -- Made on the device, so that a repeated delivery is recognised.
  id uuid not null,
  visit_id uuid not null,
  kind text not null,
  payload jsonb not null,
  by_membership_id uuid not null,
  device_at timestamptz not null,
  received_at timestamptz not null default now(),
  -- Orders acts of one instant as they came in.
  seq bigint generated always as identity,
  primary key (shop_id, id),
  foreign key (shop_id, visit_id) references visits (shop_id, id),
  foreign key (shop_id, by_membership_id) references memberships (shop_id, id)
);
create index acts_of_visit on acts (shop_id, visit_id, device_at, seq);
select app.protect('acts', 'shop');
select app.append_only('acts');

create table visit_times (
  shop_id uuid not null references shops (id),
  id uuid not null,
  visit_id uuid not null,
  membership_id uuid not null,
  arrived_at timestamptz not null,
  left_at timestamptz,
  primary key (shop_id, id),
  foreign key (shop_id, visit_id) references visits (shop_id, id),
  foreign key (shop_id, membership_id) references memberships (shop_id, id)
);
create index visit_times_of_visit on visit_times (shop_id, visit_id);
select app.protect('visit_times', 'shop');

create table jobs (
  shop_id uuid not null references shops (id),
  id uuid not null,
  client_id uuid not null,
  store_id uuid not null,
  visit_id uuid not null,
  machine_id uuid not null,
  call_id uuid,
  -- The job's place within its visit: ticket 0398/2.
  position integer not null,
  symptom text not null default '',
  cautions jsonb not null default '[]',
  cautions_at timestamptz,
  finding text not null default '',
  finding_code text,
  category text,
  cause text,
  action text not null default '',
  result text,
  machine_state text,
  minutes integer not null default 0,
  after_hours_minutes integer not null default 0,
  access_minutes integer not null default 0,
  test_cycles integer not null default 0,
  test_coins integer not null default 0,
  test_amount bigint not null default 0,
  warranty_mark text not null default 'none' check (warranty_mark in ('none', 'shop_warranty', 'own_mistake')),
  mark_words text not null default '',
  marked_by text not null default '',
  caused_by_job_id uuid,
  -- Whose minutes they are: what an hour costs the shop goes by the person.
  membership_id uuid,
  done_at timestamptz,
  version integer not null default 1,
  created_at timestamptz not null default now(),
  updated_at timestamptz not null default now(),
  primary key (shop_id, id),
  unique (shop_id, visit_id, position),
  foreign key (shop_id, client_id) references clients (shop_id, id),
  foreign key (shop_id, store_id) references stores (shop_id, id),
  foreign key (shop_id, visit_id) references visits (shop_id, id),
  foreign key (shop_id, machine_id) references machines (shop_id, id),
  foreign key (shop_id, call_id) references calls (shop_id, id),
  foreign key (shop_id, caused_by_job_id) references jobs (shop_id, id),
  foreign key (shop_id, membership_id) references memberships (shop_id, id)
);
create index jobs_of_machine on jobs (shop_id, machine_id, created_at desc, id desc);
create index jobs_of_client on jobs (shop_id, client_id, created_at desc, id desc);
select app.versioned('jobs');
select app.protect('jobs', 'client');

create table part_uses (
  shop_id uuid not null references shops (id),
  id uuid not null,
  client_id uuid not null,
  job_id uuid not null,
  part_id uuid,
  description text not null,
  category text not null default '',
  quantity_milli bigint not null check (quantity_milli > 0),
  source text not null check (source in ('shelf', 'van', 'storeroom', 'ordered', 'salvaged')),
  unit_cost bigint not null default 0,
  fixed_price bigint,
  primary key (shop_id, id),
  foreign key (shop_id, client_id) references clients (shop_id, id),
  foreign key (shop_id, job_id) references jobs (shop_id, id),
  foreign key (shop_id, part_id) references parts (shop_id, id)
);
create index part_uses_of_job on part_uses (shop_id, job_id);
select app.protect('part_uses', 'client');

create table open_items (
  shop_id uuid not null references shops (id),
  id uuid not null,
  client_id uuid not null,
  store_id uuid not null,
  machine_id uuid,
  visit_id uuid not null,
  words text not null,
  done_at timestamptz,
  created_at timestamptz not null default now(),
  primary key (shop_id, id),
  foreign key (shop_id, client_id) references clients (shop_id, id),
  foreign key (shop_id, store_id) references stores (shop_id, id),
  foreign key (shop_id, machine_id) references machines (shop_id, id),
  foreign key (shop_id, visit_id) references visits (shop_id, id)
);
create index open_items_of_store on open_items (shop_id, store_id) where done_at is null;
select app.protect('open_items', 'client');

-- The engine's proposal and the owner's word, each a row; the newest of a line is in force.
create table rulings (
  shop_id uuid not null references shops (id),
  id uuid not null,
  visit_id uuid not null,
  job_id uuid not null,
  line_key text not null,
  step text not null check (step in ('proposed', 'confirmed', 'overruled')),
  bearer text not null check (bearer in ('store', 'shop', 'supplier', 'contract', 'goodwill')),
  reasons jsonb not null default '[]',
  needs_confirmation boolean not null default false,
  list bigint not null default 0,
  cost bigint not null default 0,
  -- What the proposal rests on, folded: a decision holds only while a fresh proposal has the same.
  basis text not null default '',
  why text not null default '',
  by_user_id uuid,
  at timestamptz not null default now(),
  primary key (shop_id, id),
  foreign key (shop_id, visit_id) references visits (shop_id, id),
  foreign key (shop_id, job_id) references jobs (shop_id, id)
);
create index rulings_of_visit on rulings (shop_id, visit_id, line_key, id desc);
select app.protect('rulings', 'shop');
select app.append_only('rulings');

create table tickets (
  shop_id uuid not null references shops (id),
  id uuid not null,
  client_id uuid not null,
  store_id uuid not null,
  visit_id uuid not null,
  number bigint not null,
  signed_off_on date not null,
  signed_off_at timestamptz not null default now(),
  signed_off_by uuid,
  edition_id uuid not null,
  currency text not null,
  list bigint not null,
  net bigint not null,
  tax bigint not null,
  total bigint not null,
  borne_by_shop bigint not null,
  own_cost bigint not null,
  primary key (shop_id, id),
  unique (shop_id, number),
  unique (shop_id, visit_id),
  foreign key (shop_id, client_id) references clients (shop_id, id),
  foreign key (shop_id, store_id) references stores (shop_id, id),
  foreign key (shop_id, visit_id) references visits (shop_id, id),
  foreign key (shop_id, edition_id) references editions (shop_id, id),
  check (total = net + tax)
);
create index tickets_newest on tickets (shop_id, signed_off_on desc, id desc);
create index tickets_of_store on tickets (shop_id, store_id, signed_off_on desc, id desc);
create index tickets_of_client on tickets (shop_id, client_id, signed_off_on desc, id desc);
select app.protect('tickets', 'client');
select app.append_only('tickets');
alter table visits add foreign key (shop_id, ticket_id) references tickets (shop_id, id);

create table ticket_lines (
  shop_id uuid not null references shops (id),
  id uuid not null,
  client_id uuid not null,
  ticket_id uuid not null,
  job_id uuid,
  position integer not null,
  line_key text not null,
  kind text not null,
  description text not null,
  -- Labour is priced by the hour and counted in minutes, parts each: what quantity_milli counts.
  unit text not null default 'each' check (unit in ('each', 'minute')),
  quantity_milli bigint not null,
  unit_price bigint not null,
  discount bigint not null default 0,
  bearer text not null check (bearer in ('store', 'shop', 'supplier', 'contract', 'goodwill')),
  list bigint not null,
  charged bigint not null,
  -- Rates have up to three decimals (8.875 % is 887.5), which a double holds well enough to print.
  tax_basis_points double precision not null,
  tax bigint not null,
  cost bigint not null,
  price_reasons jsonb not null default '[]',
  reasons jsonb not null default '[]',
  -- By whom and why, where the owner decided.
  decision jsonb,
  primary key (shop_id, id),
  unique (shop_id, ticket_id, position),
  foreign key (shop_id, client_id) references clients (shop_id, id),
  foreign key (shop_id, ticket_id) references tickets (shop_id, id),
  foreign key (shop_id, job_id) references jobs (shop_id, id),
  check (bearer = 'store' or charged = 0)
);
create index ticket_lines_of_job on ticket_lines (shop_id, job_id);
select app.protect('ticket_lines', 'client');
select app.append_only('ticket_lines');
