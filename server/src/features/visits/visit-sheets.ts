import { addDays } from '@lib/domain';
import { type Context } from '../../core/context';
import { type Bind, rows, withTenant } from '../../core/database/tenancy';
import { type AnswerOf } from '../../core/http/route';
import { editionInForce } from '../prices/edition-in-force';
import { tradeDayNow } from '../settings/trade-day';
import { earlierJobsOn, longestWindow, presentEarlierJob } from './earlier-jobs';
import { jobsOfVisits } from './read-jobs';
import { openItemsAt } from './read-open-items';
import { callsOfVisits, visitRow } from './read-visits';
import { presentVisit, type VisitRow, visitSelect } from './visit-row';

type Sheet = AnswerOf<'visits.sheet'>;

/** A person's own visits of a day, and those nobody is assigned to, each with all it needs. */
export function ownDay(context: Context, on?: string): Promise<AnswerOf<'visits.day'>> {
  return withTenant(context, async () => {
    const day = on ?? (await tradeDayNow(context));
    const visits = await rows<VisitRow>(
      `${visitSelect}
       where v.shop_id = $shopId and v.planned_on = $day and v.state <> 'cancelled'
         and (v.tech_membership_id is null or v.tech_membership_id = $membershipId)
       order by v.window_start nulls last, v.number`,
      { shopId: context.shopId, day, membershipId: context.membershipId },
    );
    return { on: day, sheets: await sheets(context, visits) };
  });
}

export function showSheet(context: Context, visitId: string): Promise<Sheet> {
  return withTenant(context, async () => {
    const [sheet] = await sheets(context, [await visitRow(context, visitId)]);
    return sheet as Sheet;
  });
}

/** A fixed number of queries, however many visits: the phone asks for a day on a poor signal. */
async function sheets(context: Context, visits: VisitRow[]): Promise<Sheet[]> {
  if (visits.length === 0) return [];
  const visitIds = visits.map((visit) => visit.id);
  const storeIds = [...new Set(visits.map((visit) => visit.storeId))];
  const bind = { shopId: context.shopId, storeIds };
  const stores = await storesOf(bind);
  const contacts = await contactsOf(bind);
  const conditions = await conditionsOf(bind);
  const machines = await machinesOf(bind);
  const openItems = await openItemsAt(context, storeIds);
  const calls = await callsOfVisits(context, visitIds);
  const jobs = await jobsOfVisits(context, visitIds);
  const earlier = await earlierOf(
    context,
    machines.map((machine) => machine.id),
    visitIds,
  );
  return visits.map((visit) => {
    const { storeId } = visit;
    const ofStore = <T extends { storeId: string }>(all: T[]) =>
      all.filter((each) => each.storeId === storeId);
    return {
      visit: presentVisit(context, visit),
      store: stores.find((store) => store.id === storeId) as Sheet['store'],
      contacts: ofStore(contacts).map(({ name, phone }) => ({ name, phone })),
      conditions: ofStore(conditions),
      openItems: openItems.get(storeId) ?? [],
      machines: ofStore(machines).map(({ storeId: _, ...machine }) => machine),
      calls: calls.get(visit.id) ?? [],
      jobs: jobs.get(visit.id) ?? [],
      earlierJobs: ofStore(earlier).map(({ storeId: _, ...job }) => job),
    };
  });
}

function storesOf(bind: Bind): Promise<Sheet['store'][]> {
  return rows<Sheet['store']>(
    `select id, name, address, hours, access_words as "accessWords", card_value as "cardValue"
     from stores where shop_id = $shopId and id = any ($storeIds::uuid[])`,
    bind,
  );
}

function contactsOf(bind: Bind): Promise<{ storeId: string; name: string; phone: string }[]> {
  return rows(
    `select store_id as "storeId", name, phone from contacts
     where shop_id = $shopId and store_id = any ($storeIds::uuid[]) and phone <> ''
       and ended_at is null order by name, id`,
    bind,
  );
}

async function conditionsOf(bind: Bind): Promise<Sheet['conditions']> {
  const found = await rows<
    Omit<Sheet['conditions'][number], 'machine' | 'createdAt' | 'clearedAt'> & {
      machineId: string | null;
      bay: string | null;
      createdAt: Date;
    }
  >(
    `select k.id, k.store_id as "storeId", m.id as "machineId", m.bay, k.kind, k.words,
       k.extra_minutes as "extraMinutes", k.tool, k.created_at as "createdAt", k.version
     from conditions k left join machines m on m.shop_id = k.shop_id and m.id = k.machine_id
     where k.shop_id = $shopId and k.store_id = any ($storeIds::uuid[]) and k.cleared_at is null
     order by k.kind = 'hazard' desc, k.created_at, k.id`,
    bind,
  );
  return found.map(({ machineId, bay, createdAt, ...condition }) => ({
    ...condition,
    machine: machineId !== null && bay !== null ? { id: machineId, bay } : null,
    createdAt: createdAt.toISOString(),
    clearedAt: null,
  }));
}

async function machinesOf(
  bind: Bind,
): Promise<(Sheet['machines'][number] & { storeId: string })[]> {
  const found = await rows<
    Omit<Sheet['machines'][number], 'bank'> & {
      storeId: string;
      bankId: string;
      letter: string;
      bankWords: string;
    }
  >(
    `select m.id, m.store_id as "storeId", m.bay, m.bay_number as "bayNumber", b.id as "bankId",
       b.letter, b.words as "bankWords", m.kind, m.energy, m.make, m.model, m.serial, m.state,
       m.vend_price as "vendPrice", m.supplier_warranty_until as "supplierWarrantyUntil"
     from machines m join banks b on b.shop_id = m.shop_id and b.id = m.bank_id
     where m.shop_id = $shopId and m.store_id = any ($storeIds::uuid[]) and m.state <> 'retired'
     order by b.letter, m.bay_number, m.id`,
    bind,
  );
  return found.map(({ bankId, letter, bankWords, ...machine }) => ({
    ...machine,
    bank: { id: bankId, letter, words: bankWords },
  }));
}

async function earlierOf(context: Context, machineIds: string[], visitIds: string[]) {
  const today = await tradeDayNow(context);
  const rules = (await editionInForce(context, today))?.book.warranty;
  const since = addDays(today, -longestWindow(rules));
  const jobs = await earlierJobsOn(context, { machineIds, since, visitIds });
  return jobs.map((job) => ({ ...presentEarlierJob(job, rules), storeId: job.storeId }));
}
