import { type DateTime } from 'luxon';
import { ask } from './ask';
import { finishWork, type JobStory, type PastJob, thinkUpJob } from './day-story';
import { type Person } from './people';
import { type Random } from './random';
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
  daysLeft: number,
): Promise<Planned[]> {
  const next = day.plus({ days: day.weekday === 5 ? 3 : 1 });
  const planned: Planned[] = [];
  for (const store of shop.stores) {
    const waiting = await openCallsOf(shop, store, day);
    // The days one looks at are busy ones.
    const busy = daysLeft < 2 ? 0.6 : store.plan.visitsAMonth / 21 + waiting.size * 0.3;
    if (!random.chance(busy)) continue;
    const tech = shop.techs[(planned.length + day.day) % shop.techs.length] as Person;
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
      day.set({ hour: 10 + random.below(6) }),
      random,
    );
    for (const [machineId, callId] of waiting) calls.set(machineId, callId);
    const visit = await ask(
      shop.office.at(day.set({ hour: 16, minute: 40 }).toJSDate()),
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
    if (daysLeft < 2 && random.chance(0.5)) {
      await ask(shop.office.at(day.set({ hour: 16, minute: 50 }).toJSDate()), 'visits.confirm', {
        params: { visitId: visit.id },
        version: visit.version,
      });
    }
    planned.push({ visitId: visit.id, store, tech, stories, calls, hour });
  }
  return planned;
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
): Promise<Map<string, string>> {
  const calls = new Map<string, string>();
  for (const story of stories) {
    if (calls.size > 0 && random.chance(0.4)) continue;
    const byStore = random.chance(0.5);
    const caller = byStore ? store.attendant : shop.office;
    const call = await ask(caller.at(at.toJSDate()), 'calls.report', {
      body: {
        storeId: store.id,
        machineId: story.machine.id,
        symptom: story.fault?.symptom ?? 'other',
        words: story.words,
        ...(byStore ? {} : { reportedBy: store.plan.attendant }),
      },
    });
    calls.set(story.machine.id, call.id);
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
