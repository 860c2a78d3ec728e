import { DateTime } from 'luxon';
import { ask } from './ask';
import { type JobStory, type PastJob, thinkUpJob } from './day-story';
import { closeMonthsDue, payWhatIsDue } from './months';
import { addContracts, planRounds } from './rounds';
import { playVisit } from './play-visit';
import { type Person } from './people';
import { type Random } from './random';
import { type DemoShop, type DemoStore } from './set-up';
import { signOff } from './sign-off';

interface Planned {
  visitId: string;
  store: DemoStore;
  tech: Person;
  stories: JobStory[];
  calls: Map<string, string>;
  hour: number;
}

/** Lives through the shop's days, from `first` to `today`: calls, visits, rounds, months, payments. */
export async function liveThrough(
  shop: DemoShop,
  first: DateTime,
  today: DateTime,
  random: Random,
): Promise<void> {
  const past = new Map<string, PastJob[]>();
  await addContracts(shop, first);
  let coming: Planned[] = [];
  for (let day = first; day <= today; day = day.plus({ days: 1 })) {
    await planRounds(shop, day);
    await closeMonthsDue(shop, day, first, today);
    await payWhatIsDue(shop, day);
    if (day.weekday > 5) continue;
    // The last two days stay on the desk: something is left to rule and to sign off.
    const unsigned = today.diff(day, 'days').days < 4;
    if (day < today) {
      for (const visit of [...coming, ...(await roundsOf(shop, day, past, random))]) {
        await live(shop, visit, day, past, unsigned, random);
      }
    }
    coming = await planNext(shop, day, past, random, day >= today);
  }
  await leaveCallsOpen(shop, today, random);
}

async function live(
  shop: DemoShop,
  visit: Planned,
  day: DateTime,
  past: Map<string, PastJob[]>,
  unsigned: boolean,
  random: Random,
): Promise<void> {
  const arrival = day.set({ hour: visit.hour, minute: random.below(40) }).toJSDate();
  const done = await playVisit(
    shop,
    visit.tech,
    visit.visitId,
    visit.stories,
    visit.calls,
    arrival,
    random,
  );
  past.set(visit.store.id, [...(past.get(visit.store.id) ?? []), ...done]);
  if (unsigned) return;
  await signOff(shop, visit.visitId, day.set({ hour: 17, minute: 30 }).toJSDate(), random);
}

/** The afternoon before: calls come in, and the office plans the next working day. */
async function planNext(
  shop: DemoShop,
  day: DateTime,
  past: Map<string, PastJob[]>,
  random: Random,
  stayPlanned: boolean,
): Promise<Planned[]> {
  const next = day.plus({ days: day.weekday === 5 ? 3 : 1 });
  const planned: Planned[] = [];
  for (const store of shop.stores) {
    if (!random.chance(store.plan.visitsAMonth / 21)) continue;
    const tech = shop.techs[(planned.length + day.day) % shop.techs.length] as Person;
    const stories = thinkUp(store, past.get(store.id) ?? [], next, 1 + random.below(3), random);
    const hour = 8 + 2 * random.below(4);
    const calls = await takeCalls(
      shop,
      store,
      stories,
      day.set({ hour: 10 + random.below(6) }),
      random,
    );
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
    if (stayPlanned && random.chance(0.5)) {
      await ask(shop.office.at(day.set({ hour: 16, minute: 50 }).toJSDate()), 'visits.confirm', {
        params: { visitId: visit.id },
        version: visit.version,
      });
    }
    planned.push({ visitId: visit.id, store, tech, stories, calls, hour });
  }
  return planned;
}

function thinkUp(
  store: DemoStore,
  past: readonly PastJob[],
  day: DateTime,
  howMany: number,
  random: Random,
): JobStory[] {
  const taken = new Set<string>();
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

/** Rounds of contracts planned for this day, which the first tech makes. */
async function roundsOf(
  shop: DemoShop,
  day: DateTime,
  past: Map<string, PastJob[]>,
  random: Random,
): Promise<Planned[]> {
  const on = day.toISODate() as string;
  const { items } = await ask(shop.office.at(day.toJSDate()), 'rounds.list', {
    query: { from: on, to: on, state: 'planned', limit: 100 },
  });
  return items.flatMap((round) => {
    const store = shop.stores.find((s) => s.id === round.storeId);
    if (!store || !round.visitId) return [];
    const stories = thinkUp(store, past.get(store.id) ?? [], day, 2, random);
    return [
      {
        visitId: round.visitId,
        store,
        tech: shop.techs[0] as Person,
        stories,
        calls: new Map<string, string>(),
        hour: 9,
      },
    ];
  });
}

async function leaveCallsOpen(shop: DemoShop, today: DateTime, random: Random): Promise<void> {
  for (const store of shop.stores.slice(0, 3)) {
    const [story] = thinkUp(store, [], today, 1, random);
    if (!story) continue;
    const call = await ask(
      store.attendant.at(today.set({ hour: 7, minute: 20 }).toJSDate()),
      'calls.report',
      {
        body: {
          storeId: store.id,
          machineId: story.machine.id,
          symptom: story.fault?.symptom ?? 'other',
          words: story.words,
        },
      },
    );
    if (random.chance(0.7)) {
      const machine = await ask(shop.office.at(today.toJSDate()), 'machines.show', {
        params: { machineId: story.machine.id },
      });
      await ask(shop.office.at(today.toJSDate()), 'machines.setState', {
        params: { machineId: machine.id },
        version: machine.version,
        body: { state: 'down', words: `Call ${call.number}` },
      });
    }
  }
}
