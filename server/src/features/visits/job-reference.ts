/**
 * A job as people quote it: the ticket's number and the job's place on it, `0398/2`; before sign-off
 * the visit's, `visit 412/2`. Takes the aliases of the job, its visit and its ticket.
 */
export function referenceColumn(job: string, visit: string, ticket: string): string {
  return `coalesce(lpad(${ticket}.number::text, greatest(4, length(${ticket}.number::text)), '0'),
    'visit ' || ${visit}.number) || '/' || ${job}.position`;
}

/** The trade day of a visit's work: when somebody arrived, on the shop's clock; else the day planned. */
export function workedOnColumn(visit: string, shop: string): string {
  return `coalesce((${visit}.arrived_at at time zone ${shop}.zone)::date, ${visit}.planned_on)`;
}
