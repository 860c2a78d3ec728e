-- The sweep forgets sessions that ended or ran out long ago, and their refresh tokens with them.
grant delete on sessions to tw_platform;
create index sessions_over on sessions ((coalesce(ended_at, expires_at)));
