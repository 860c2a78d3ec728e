import { type Context } from '../../../core/context';
import { type Bind, row, rows, write } from '../../../core/database/tenancy';
import { announce } from '../../../core/live/live';
import { type VisitToRecord } from './read-facts';
import { type DatedAct, type JobRecord, type VisitRecord } from './visit-record';

const iso = (at: number | null): string | null => (at === null ? null : new Date(at).toISOString());

/** Brings the tables in line with the record, as far as the accepted acts touched it. */
export async function writeProjection(
  context: Context,
  visit: VisitToRecord,
  record: VisitRecord,
  accepted: readonly DatedAct[],
): Promise<{ state: string; version: number }> {
  const of = {
    shopId: context.shopId,
    visitId: visit.id,
    clientId: visit.clientId,
    storeId: visit.storeId,
  };
  const touched = new Set(accepted.flatMap(({ act }) => jobOf(act.payload)));
  await writeJobs(
    of,
    [...touched].flatMap((id) => record.jobs.get(id) ?? []),
  );
  await writeParts(of, record, accepted);
  await dropJobs(
    of,
    [...touched].filter((id) => record.dropped.has(id)),
  );
  await writeTimes(of, record, accepted);
  await writeOpenItems(of, record, accepted);
  await planCalls(context, of, accepted);
  await leaveMachines(context, of, record, accepted);
  return writeVisit(context, of, record);
}

function jobOf(payload: object): string[] {
  return 'jobId' in payload ? [payload.jobId as string] : [];
}

async function writeJobs(of: Bind, jobs: readonly JobRecord[]): Promise<void> {
  if (jobs.length === 0) return;
  const known = await rows<{ id: string; position: number }>(
    `select id, position from jobs where shop_id = $shopId and visit_id = $visitId`,
    { shopId: of.shopId, visitId: of.visitId },
  );
  let last = Math.max(0, ...known.map((job) => job.position));
  const ids = new Set(known.map((job) => job.id));
  const values = [...jobs]
    .sort((a, b) => a.openedAt - b.openedAt)
    .map((job) => ({ ...columnsOf(job), position: ids.has(job.id) ? 0 : ++last }));
  await write(
    `insert into jobs (shop_id, client_id, store_id, visit_id, position, ${jobColumns.join(', ')})
     select $shopId, $clientId, $storeId, $visitId, j.position, ${jobColumns.map((c) => `j.${c}`).join(', ')}
     from jsonb_populate_recordset(null::jobs, $jobs::jsonb) j
     on conflict (shop_id, id) do update set
       ${jobColumns
         .filter((c) => c !== 'id')
         .map((c) => `${c} = excluded.${c}`)
         .join(', ')}`,
    { ...of, jobs: JSON.stringify(values) },
  );
}

function columnsOf(job: JobRecord) {
  return {
    id: job.id,
    machine_id: job.machineId,
    call_id: job.callId,
    symptom: job.symptom ?? '',
    cautions: [...job.cautions],
    cautions_at: iso(job.cautionsAt),
    finding: job.finding,
    finding_code: job.findingCode,
    category: job.category,
    cause: job.cause,
    action: job.action,
    result: job.result,
    machine_state: job.machineState,
    minutes: job.minutes,
    after_hours_minutes: job.afterHoursMinutes,
    access_minutes: job.accessMinutes,
    test_cycles: job.testCycles,
    test_coins: job.testCoins,
    test_amount: job.testAmount,
    warranty_mark: job.mark,
    mark_words: job.markWords,
    marked_by: job.markedBy,
    caused_by_job_id: job.causedByJobId,
    membership_id: job.membershipId,
    created_at: iso(job.openedAt),
    done_at: iso(job.doneAt),
  };
}
const jobColumns = [
  'id',
  'machine_id',
  'call_id',
  'symptom',
  'cautions',
  'cautions_at',
  'finding',
  'finding_code',
  'category',
  'cause',
  'action',
  'result',
  'machine_state',
  'minutes',
  'after_hours_minutes',
  'access_minutes',
  'test_cycles',
  'test_coins',
  'test_amount',
  'warranty_mark',
  'mark_words',
  'marked_by',
  'caused_by_job_id',
  'membership_id',
  'created_at',
  'done_at',
] as const satisfies readonly (keyof ReturnType<typeof columnsOf>)[];

/** A part keeps the cost and price it had when it was written down, whatever the book says later. */
async function writeParts(
  of: Bind,
  record: VisitRecord,
  accepted: readonly DatedAct[],
): Promise<void> {
  const named = accepted.flatMap(({ act }) =>
    act.kind === 'part_used' || act.kind === 'part_removed' ? [act.payload.partUseId] : [],
  );
  if (named.length === 0) return;
  const gone = named.filter((id) => !record.parts.has(id));
  if (gone.length > 0) {
    await write(`delete from part_uses where shop_id = $shopId and id = any ($gone::uuid[])`, {
      shopId: of.shopId,
      gone,
    });
  }
  const used = named.flatMap((id) => record.parts.get(id) ?? []);
  await write(
    `insert into part_uses (shop_id, id, client_id, job_id, part_id, description, category,
       quantity_milli, source, unit_cost, fixed_price)
     select $shopId, u.id, $clientId, u."jobId", p.id, coalesce(u.description, p.name),
       coalesce(p.category, j.category, ''), u."quantityMilli", u.source,
       coalesce(u."unitCost", p.unit_cost, 0), p.fixed_price
     from jsonb_to_recordset($used::jsonb) as u (id uuid, "jobId" uuid, "partId" uuid,
       description text, "unitCost" bigint, "quantityMilli" bigint, source text)
     join jobs j on j.shop_id = $shopId and j.id = u."jobId"
     left join parts p on p.shop_id = $shopId and p.id = u."partId"
     on conflict (shop_id, id) do nothing`,
    { shopId: of.shopId, clientId: of.clientId, used: JSON.stringify(used) },
  );
}

async function dropJobs(of: Bind, dropped: readonly string[]): Promise<void> {
  if (dropped.length === 0) return;
  const bind = { shopId: of.shopId, dropped };
  await write(
    'delete from part_uses where shop_id = $shopId and job_id = any ($dropped::uuid[])',
    bind,
  );
  await write('delete from jobs where shop_id = $shopId and id = any ($dropped::uuid[])', bind);
}

async function writeTimes(
  of: Bind,
  record: VisitRecord,
  accepted: readonly DatedAct[],
): Promise<void> {
  if (!accepted.some(({ act }) => act.kind === 'arrived' || act.kind === 'left')) return;
  const bind = { shopId: of.shopId, visitId: of.visitId };
  await write('delete from visit_times where shop_id = $shopId and visit_id = $visitId', bind);
  const times = record.times.map((time) => ({
    membershipId: time.membershipId,
    arrivedAt: iso(time.arrivedAt),
    leftAt: iso(time.leftAt),
  }));
  await write(
    `insert into visit_times (shop_id, id, visit_id, membership_id, arrived_at, left_at)
     select $shopId, gen_random_uuid(), $visitId, t."membershipId", t."arrivedAt", t."leftAt"
     from jsonb_to_recordset($times::jsonb)
       as t ("membershipId" uuid, "arrivedAt" timestamptz, "leftAt" timestamptz)`,
    { ...bind, times: JSON.stringify(times) },
  );
}

async function writeOpenItems(
  of: Bind,
  record: VisitRecord,
  accepted: readonly DatedAct[],
): Promise<void> {
  const left = accepted.flatMap(({ act }) => {
    const item = act.kind === 'handed_over' ? record.openItems.get(act.payload.openItemId) : null;
    return item ? [{ ...item, at: iso(item.at) }] : [];
  });
  if (left.length > 0) {
    await write(
      `insert into open_items (shop_id, id, client_id, store_id, machine_id, visit_id, words, created_at)
       select $shopId, o.id, $clientId, $storeId, o."machineId", $visitId, o.words, o.at
       from jsonb_to_recordset($left::jsonb)
         as o (id uuid, "machineId" uuid, words text, at timestamptz)`,
      { ...of, left: JSON.stringify(left) },
    );
  }
  const done = accepted.flatMap(({ act }) => {
    if (act.kind !== 'open_item_done') return [];
    const id = act.payload.openItemId;
    return [{ id, at: iso(record.itemsDone.get(id) ?? null) }];
  });
  if (done.length > 0) {
    await write(
      `update open_items o set done_at = d.at
       from jsonb_to_recordset($done::jsonb) as d (id uuid, at timestamptz)
       where o.shop_id = $shopId and o.id = d.id and o.done_at is null`,
      { shopId: of.shopId, done: JSON.stringify(done) },
    );
  }
}

/** A call whose machine is worked on now is this visit's, whatever visit it was planned for. */
async function planCalls(
  context: Context,
  of: Bind & { clientId: string },
  accepted: readonly DatedAct[],
): Promise<void> {
  const callIds = accepted.flatMap(({ act }) =>
    act.kind === 'job_opened' && act.payload.callId ? [act.payload.callId] : [],
  );
  if (callIds.length === 0) return;
  const planned = await write<{ id: string }>(
    `update calls set state = 'planned', visit_id = $visitId, planned_at = coalesce(planned_at, $now)
     where shop_id = $shopId and id = any ($callIds::uuid[]) and state in ('open', 'planned')
       and visit_id is distinct from $visitId returning id`,
    { shopId: of.shopId, visitId: of.visitId, callIds, now: context.now },
  );
  for (const { id } of planned) await announce(context, 'call', id, of.clientId);
}

/** Only by what was accepted now: the office may have set a machine's state since an older act. */
async function leaveMachines(
  context: Context,
  of: Bind & { clientId: string },
  record: VisitRecord,
  accepted: readonly DatedAct[],
): Promise<void> {
  const now = new Set(accepted.map(({ act }) => act.id));
  const left = [...record.machineStates]
    .filter(([, { actId }]) => now.has(actId))
    .map(([id, { state, at }]) => ({ id, state, at: iso(at) }));
  if (left.length === 0) return;
  const changed = await write<{ id: string }>(
    `update machines m set state = x.state, state_since = x.at
     from jsonb_to_recordset($left::jsonb) as x (id uuid, state text, at timestamptz)
     where m.shop_id = $shopId and m.id = x.id and m.state <> 'retired' and m.state <> x.state
       and m.state_since <= x.at
     returning m.id`,
    { shopId: of.shopId, left: JSON.stringify(left) },
  );
  for (const { id } of changed) await announce(context, 'machines', id, of.clientId);
}

async function writeVisit(
  context: Context,
  of: Bind & { clientId: string; visitId: string },
  record: VisitRecord,
): Promise<{ state: string; version: number }> {
  const state = record.completedAt !== null ? 'completed' : record.started ? 'in_process' : null;
  const written = await row<{ state: string; version: number }>(
    `update visits set state = coalesce($state, state), arrived_at = $arrivedAt, left_at = $leftAt,
       completed_at = $completedAt, received_by = $receivedBy,
       tech_membership_id = coalesce(tech_membership_id, $techMembershipId)
     where shop_id = $shopId and id = $visitId returning state, version`,
    {
      shopId: of.shopId,
      visitId: of.visitId,
      state,
      arrivedAt: iso(record.arrivedAt),
      leftAt: iso(record.leftAt),
      completedAt: iso(record.completedAt),
      receivedBy: record.receivedBy,
      // Whoever does the work of a visit without a tech is its tech.
      techMembershipId: context.role === 'tech' ? context.membershipId : null,
    },
  );
  await announce(context, 'visit', of.visitId, of.clientId);
  return written as { state: string; version: number };
}
