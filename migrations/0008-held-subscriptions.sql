-- A pause by a platform admin stays until an admin lifts it, whatever is paid meanwhile. The state
-- the shop would be in otherwise goes on behind it, and is what the shop is resumed to.
alter table subscriptions add column held_from text
  check (held_from in ('trialing', 'active', 'past_due', 'paused', 'canceled'));
alter table subscriptions add constraint held_is_paused check (held_from is null or state = 'paused');
