-- The price book: each edition is one dated document, complete in itself and never changed, so that
-- what a visit was priced by can always be read back (docs/decisions/0007-price-book.md).

create table editions (
  shop_id uuid not null references shops (id),
  id uuid not null,
  number integer not null,
  valid_from date not null,
  book jsonb not null,
  note text not null default '',
  by_user_id uuid,
  created_at timestamptz not null default now(),
  primary key (shop_id, id),
  unique (shop_id, number)
);
create index editions_in_force on editions (shop_id, valid_from desc, number desc);
select app.protect('editions', 'shop');
select app.append_only('editions');

create table parts (
  shop_id uuid not null references shops (id),
  id uuid not null,
  number text not null,
  name text not null,
  category text not null,
  unit_cost bigint not null check (unit_cost >= 0),
  -- Set: the price is fixed; absent: cost plus the price book's markup.
  fixed_price bigint,
  makers_part boolean not null default true,
  superseded_by uuid,
  scarce boolean not null default false,
  supplier text not null default '',
  ended_at timestamptz,
  version integer not null default 1,
  created_at timestamptz not null default now(),
  updated_at timestamptz not null default now(),
  primary key (shop_id, id),
  unique (shop_id, number),
  foreign key (shop_id, superseded_by) references parts (shop_id, id)
);
create index parts_by_name on parts (shop_id, name, id);
select app.versioned('parts');
select app.protect('parts', 'shop');
