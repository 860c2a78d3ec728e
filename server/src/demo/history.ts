import { type DateTime } from 'luxon';
import { ask } from './ask';
import { type PastJob } from './day-story';
import { closeMonthsDue, payWhatIsDue } from './months';
import { addPhotos } from './photos';
import { type Planned, planNext, thinkUp } from './plan-day';
import { addContracts, planRounds } from './rounds';
import { playVisit } from './play-visit';
import { type Person } from './people';
import { type Random } from './random';
import { type DemoShop } from './set-up';
import { signOff } from './sign-off';

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
    coming = await planNext(shop, day, past, random, today.diff(day, 'days').days);
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
  await addPhotos(visit.tech, done, arrival, random);
  past.set(visit.store.id, [...(past.get(visit.store.id) ?? []), ...done]);
  if (unsigned) return;
  await signOff(shop, visit.visitId, day.set({ hour: 17, minute: 30 }).toJSDate(), random);
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
