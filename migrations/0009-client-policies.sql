-- What a client's people may see, worded so that the planner guesses well. Of "no client is set, or
-- client_id is it" PostgreSQL expects one row in two hundred of each table, and for the people of the
-- shop, who see all, a list of a large shop was read whole and sorted. Of coalesce it expects half.
create function app.of_client(client_id text) returns text language sql immutable
  as $$ select format('coalesce(%s = (select app.client()), (select app.client()) is null)', client_id) $$;

create or replace function app.protect(tab regclass, seen_by text) returns void language plpgsql as $$
declare
  own text := 'shop_id = (select app.shop())';
  rule text;
begin
  rule := case seen_by
    when 'shop' then own || ' and (select app.client()) is null'
    when 'client' then own || ' and ' || app.of_client('client_id')
    when 'all' then own
  end;
  if rule is null then raise exception 'app.protect: seen_by % is not known', seen_by; end if;
  execute format('alter table %s enable row level security', tab);
  execute format('alter table %s force row level security', tab);
  execute format('create policy tenant on %s to tw_app using (%s) with check (%s)', tab, rule, rule);
  execute format('grant select, insert, update, delete on %s to tw_app', tab);
end $$;

do $$
declare
  tab regclass;
  rule text := 'shop_id = (select app.shop()) and ' || app.of_client('client_id');
begin
  for tab in
    select polrelid::regclass from pg_policy
    where polname = 'tenant' and pg_get_expr(polqual, polrelid) ~ 'client_id = '
  loop
    execute format('alter policy tenant on %s using (%s) with check (%s)', tab, rule, rule);
  end loop;
end $$;
