-- What the plans of lists with 100,000 rows still wanted: statements by the day they fall due, and the
-- few lines of tickets that somebody other than the store bears.
create index statements_by_due on statements (shop_id, due_on, id);
create index ticket_lines_absorbed on ticket_lines (shop_id, bearer, ticket_id)
  where bearer <> 'store';
