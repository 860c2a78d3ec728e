-- The plans a fresh installation offers; a platform admin changes them, or adds others.

insert into plans (id, code, name, monthly_amount, currency, store_limit, machine_limit, crew_limit, trial_days, grace_days)
values
  ('01963a10-0000-7000-8000-000000000001', 'bench', 'Bench', 4900, 'USD', 15, 500, 3, 30, 14),
  ('01963a10-0000-7000-8000-000000000002', 'workshop', 'Workshop', 12900, 'USD', 80, 4000, 12, 30, 14),
  ('01963a10-0000-7000-8000-000000000003', 'depot', 'Depot', 34900, 'USD', 1500, 60000, 150, 30, 14);
