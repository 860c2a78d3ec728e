-- The tools by which every tenant table is protected the same way (docs/decisions/0003-tenancy.md).
-- The roles tw_owner (owns, migrates), tw_app (requests and jobs) and tw_platform (sign-in and the
-- platform area) exist before the first migration runs.

create schema if not exists app;
grant usage on schema app to tw_app, tw_platform;
grant usage on schema public to tw_app, tw_platform;

-- The shop of the running transaction. An empty string is what SET LOCAL leaves behind: no shop.
create function app.shop() returns uuid language sql stable parallel safe
  as $$ select nullif(current_setting('app.shop_id', true), '')::uuid $$;
create function app.client() returns uuid language sql stable parallel safe
  as $$ select nullif(current_setting('app.client_id', true), '')::uuid $$;

-- Protects a tenant table. `seen_by` says what a person of a client laundry may see of it:
--   shop    nothing: the table is the shop's own
--   client  the rows of their own client (the table has client_id)
--   all     every row of the shop (child rows reached only through rows they may see)
create function app.protect(tab regclass, seen_by text) returns void language plpgsql as $$
declare
  own text := 'shop_id = (select app.shop())';
  rule text;
begin
  rule := case seen_by
    when 'shop' then own || ' and (select app.client()) is null'
    when 'client' then own || ' and ((select app.client()) is null or client_id = (select app.client()))'
    when 'all' then own
  end;
  if rule is null then raise exception 'app.protect: seen_by % is not known', seen_by; end if;
  execute format('alter table %s enable row level security', tab);
  execute format('alter table %s force row level security', tab);
  execute format('create policy tenant on %s to tw_app using (%s) with check (%s)', tab, rule, rule);
  execute format('grant select, insert, update, delete on %s to tw_app', tab);
end $$;

-- Lets sign-in and the platform area see a table of people, which they serve across shops.
create function app.open_to_platform(tab regclass) returns void language plpgsql as $$
begin
  execute format('create policy platform on %s to tw_platform using (true) with check (true)', tab);
  execute format('grant select, insert, update on %s to tw_platform', tab);
end $$;

create function app.refuse_change() returns trigger language plpgsql as $$
begin
  raise exception '% is append-only: a correction is a new row', tg_table_name
    using errcode = 'restrict_violation';
end $$;

-- What people quarrel over is never changed: by grant, and by trigger for whoever holds the grant.
create function app.append_only(tab regclass) returns void language plpgsql as $$
begin
  execute format('revoke update, delete, truncate on %s from tw_app, tw_platform', tab);
  execute format('create trigger append_only before update or delete on %s
    for each row execute function app.refuse_change()', tab);
  execute format('create trigger append_only_truncate before truncate on %s
    for each statement execute function app.refuse_change()', tab);
end $$;

-- Rows that people edit carry a version, which If-Match is compared with.
create function app.next_version() returns trigger language plpgsql as $$
begin
  new.version := old.version + 1;
  new.updated_at := now();
  return new;
end $$;

create function app.versioned(tab regclass) returns void language plpgsql as $$
begin
  execute format('create trigger next_version before update on %s
    for each row execute function app.next_version()', tab);
end $$;

-- What lists search in: lower case, without accents' case games; small tables are scanned with it.
create function app.fold(words text) returns text language sql immutable parallel safe
  as $$ select lower(coalesce(words, '')) $$;
