-- Who loses the device that shows their one-time codes signs in by one of these, each good once. The
-- codes are people's own: they belong to no shop, and the platform's role alone reads them.
create table recovery_codes (
  user_id uuid not null references users (id),
  code_hash text not null,
  created_at timestamptz not null default now(),
  used_at timestamptz,
  primary key (user_id, code_hash)
);
grant select, insert, update, delete on recovery_codes to tw_platform;
