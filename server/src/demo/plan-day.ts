import { type DateTime } from 'luxon';
import { ask } from './ask';
import { finishWork, type JobStory, type PastJob, thinkUpJob } from './day-story';
import { type Person } from './people';
import { type Random } from './random';
import { reportFault } from './report-fault';
import { type DemoShop, type DemoStore } from './set-up';

/** A visit of the next working day, and what will be found on it. */
export interface Planned {
  visitId: string;
  store: DemoStore;
  tech: Person;
  stories: JobStory[];
  calls: Map<string, string>;
  hour: number;
}

/** The afternoon before: calls come in, and the office plans the next working day. */
export async function planNext(
  shop: DemoShop,
  day: DateTime,
  past: Map<string, PastJob[]>,
  random: Random,
  today: DateTime,
): Promise<Planned[]> {
  const next = dayAfter(day, today);
  const toCome = next >= today;
  const isToday = next.hasSame(today, 'day');
  // The first tech has a visit at the first store today, for whoever tries the demo as them; and
  // somebody was out the days before, so that something is left to rule on.
  const last = today.diff(next, 'days').days < 4;
  const sure = last ? shop.stores[isToday ? 0 : day.day % shop.stores.length] : undefined;
  // Nothing happens later than now: what is planned today was reported and planned yesterday.
  const afternoon = day < today ? day : day.minus({ days: 1 });
  const planned: Planned[] = [];
  for (const store of shop.stores) {
    const waiting = await openCallsOf(shop, store, day);
    // The days one looks at are busy ones.
    const busy = toCome ? 0.6 : store.plan.visitsAMonth / 21 + waiting.size * 0.3;
    if (store !== sure && !random.chance(busy)) continue;
    const turn = planned.length + (isToday ? 0 : day.day);
    const tech = shop.techs[turn % shop.techs.length] as Person;
    const again = store.machines.filter((machine) => waiting.has(machine.id));
    const stories = [
      ...again.map((machine) => finishWork(machine, random)),
      ...thinkUp(store, past.get(store.id) ?? [], next, 1 + random.below(3), random, waiting),
    ];
    const hour = 8 + 2 * random.below(4);
    const calls = await takeCalls(
      shop,
      store,
      stories.slice(again.length),
      afternoon.set({ hour: 10 + random.below(6) }),
      random,
      toCome,
    );
    for (const [machineId, callId] of waiting) calls.set(machineId, callId);
    const visit = await ask(
      shop.office.at(afternoon.set({ hour: 16, minute: 40 }).toJSDate()),
      'visits.plan',
      {
        body: {
          storeId: store.id,
          plannedOn: next.toISODate() as string,
          techMembershipId: tech.membershipId,
          window: {
            from: `${String(hour).padStart(2, '0')}:00`,
            until: `${String(hour + 2).padStart(2, '0')}:00`,
          },
          callIds: [...calls.values()],
          reason: calls.size ? '' : 'Look over the machines',
        },
      },
    );
    if (toCome && random.chance(0.5)) {
      await ask(
        shop.office.at(afternoon.set({ hour: 16, minute: 50 }).toJSDate()),
        'visits.confirm',
        {
          params: { visitId: visit.id },
          version: visit.version,
        },
      );
    }
    planned.push({ visitId: visit.id, store, tech, stories, calls, hour });
  }
  return planned;
}

/** The next working day; at a weekend somebody goes out on the very day, so that it is no empty one. */
function dayAfter(day: DateTime, today: DateTime): DateTime {
  if (day.weekday !== 5) return day.plus({ days: 1 });
  const monday = day.plus({ days: 3 });
  return today > day && today < monday ? today : monday;
}

export function thinkUp(
  store: DemoStore,
  past: readonly PastJob[],
  day: DateTime,
  howMany: number,
  random: Random,
  waiting: ReadonlyMap<string, string> = new Map(),
): JobStory[] {
  const taken = new Set<string>(waiting.keys());
  return Array.from({ length: howMany }, () => {
    const story = thinkUpJob(store, past, day.toJSDate(), taken, random);
    taken.add(story.machine.id);
    return story;
  });
}

/** Most machines were reported; the tech finds the rest on the spot. */
async function takeCalls(
  shop: DemoShop,
  store: DemoStore,
  stories: readonly JobStory[],
  at: DateTime,
  random: Random,
  stands: boolean,
): Promise<Map<string, string>> {
  const calls = new Map<string, string>();
  for (const story of stories) {
    if (calls.size > 0 && random.chance(0.4)) continue;
    const by = random.chance(0.5) ? 'attendant' : 'office';
    calls.set(story.machine.id, await reportFault(shop, store, story, { at, by, stands }));
  }
  return calls;
}

/** Calls nobody has gone for yet, or that a visit left unfinished, by their machine. */
async function openCallsOf(
  shop: DemoShop,
  store: DemoStore,
  day: DateTime,
): Promise<Map<string, string>> {
  const { items } = await ask(shop.office.at(day.toJSDate()), 'calls.list', {
    query: { storeId: store.id, state: 'open', limit: 10 },
  });
  return new Map(items.flatMap((call) => (call.machine ? [[call.machine.id, call.id]] : [])));
}
