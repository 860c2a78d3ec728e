-- Indexes that lists were found to want with 100,000 rows a table, by the plans of every GET there is.
-- Conditions of search are not leakproof and stay scans within the shop (docs/decisions/0003-tenancy.md).

-- People: the crew is a handful beside the people of client laundries.
create index memberships_of_crew on memberships (shop_id, name, id)
  where role in ('shop_owner', 'office', 'tech');
create index memberships_of_client on memberships (shop_id, client_id, name, id)
  where client_id is not null;

drop index invitations_newest;
create index invitations_newest on invitations (shop_id, created_at desc, id desc);
create index invitations_pending on invitations (shop_id, created_at desc, id desc)
  where accepted_at is null;
create index invitations_of_client on invitations (shop_id, client_id, created_at desc, id desc)
  where client_id is not null;

-- Work.
create index open_items_of_visit on open_items (shop_id, visit_id);
create index conditions_of_machine on conditions (shop_id, machine_id) where machine_id is not null;
create index rounds_of_client on rounds (shop_id, client_id, planned_on, id);
create index rounds_of_store on rounds (shop_id, store_id, planned_on, id);

-- Money and mail: what went wrong is rare, and what people look for.
create index payments_not_succeeded on payments (shop_id, state, created_at desc, id desc)
  where state <> 'succeeded';
create index payments_of_statement on payments (shop_id, statement_id)
  where statement_id is not null;
create index deliveries_not_sent on deliveries (shop_id, state, created_at desc, id desc)
  where state <> 'sent';
create index deliveries_of_client on deliveries (shop_id, client_id, created_at desc, id desc);

-- The platform area.
create index shops_newest on shops (created_at desc, id desc);
create index platform_mails_not_sent on platform_mails (state, created_at desc, id desc)
  where state <> 'sent';
create index platform_mails_to on platform_mails (recipient, created_at desc, id desc);
create index platform_audit_of_shop on platform_audit (subject_shop_id, at desc, id desc);
drop index stripe_events_newest;
create index stripe_events_newest on stripe_events (received_at desc, id desc);
