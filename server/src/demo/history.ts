import { type DateTime } from 'luxon';
import { ask } from './ask';
import { comeBack, finishWork, type JobStory, type PastJob } from './day-story';
import { closeMonthsDue, payWhatIsDue } from './months';
import { addPhotos } from './photos';
import { reportFault } from './report-fault';
import { type Planned, planNext, thinkUp } from './plan-day';
import { addContracts, planRounds } from './rounds';
import { playVisit } from './play-visit';
import { type Person } from './people';
import { type Random } from './random';
import { type DemoMachine, type DemoShop } from './set-up';
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
    coming = await planNext(shop, day, past, random, today);
  }
  await leaveCallsOpen(shop, today, random);
  await lockOut(shop, today);
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
  const left = await leftToDo(shop, visit, arrival);
  const done = await playVisit(
    shop,
    visit.tech,
    visit.visitId,
    [
      ...visit.stories,
      ...left.machines.map((machine) => finishWork(machine, random)),
      ...(unsigned ? ownMistakes(visit, past, [...told(visit), ...left.machines]) : []),
    ],
    visit.calls,
    arrival,
    random,
    left.items,
  );
  await addPhotos(visit.tech, done, arrival, random);
  past.set(visit.store.id, [...(past.get(visit.store.id) ?? []), ...done]);
  if (unsigned) return;
  await signOff(shop, visit.visitId, day.set({ hour: 17, minute: 30 }).toJSDate(), random);
}

/** What earlier visits left to do at the store: the part has come, so this one finishes it. */
async function leftToDo(
  shop: DemoShop,
  visit: Planned,
  at: Date,
): Promise<{ items: string[]; machines: DemoMachine[] }> {
  const { openItems } = await ask(shop.office.at(at), 'stores.show', {
    params: { storeId: visit.store.id },
  });
  return {
    items: openItems.map(({ id }) => id),
    machines: visit.store.machines.filter(
      (each) =>
        !told(visit).includes(each) && openItems.some(({ machine }) => machine?.id === each.id),
    ),
  };
}

const told = (visit: Planned): DemoMachine[] => visit.stories.map(({ machine }) => machine);

/** The latest work at the store that was ours to do better: for the owner to rule on. */
function ownMistakes(
  visit: Planned,
  past: ReadonlyMap<string, readonly PastJob[]>,
  taken: readonly DemoMachine[],
): JobStory[] {
  const earlier = past
    .get(visit.store.id)
    ?.findLast((job) => !taken.some(({ id }) => id === job.machineId));
  return earlier ? [comeBack(visit.store, earlier, true)] : [];
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

/** Faults of last evening, for which nobody has planned a visit yet. */
async function leaveCallsOpen(shop: DemoShop, today: DateTime, random: Random): Promise<void> {
  const at = today.minus({ days: 1 }).set({ hour: 20, minute: 20 });
  for (const store of shop.stores.slice(0, 3)) {
    const [story] = thinkUp(store, [], today, 1, random);
    if (story) await reportFault(shop, store, story, { at, by: 'attendant', stands: true });
  }
}

/** What must not be energised is locked out, until an electrician has been there. */
async function lockOut(shop: DemoShop, today: DateTime): Promise<void> {
  const at = shop.office.at(today.minus({ days: 1 }).set({ hour: 9 }).toJSDate());
  for (const store of shop.stores) {
    for (const { kind, bay } of store.plan.conditions) {
      const machine = store.machines.find((each) => each.bay === bay);
      if (kind !== 'hazard' || !machine) continue;
      const { version } = await ask(at, 'machines.show', { params: { machineId: machine.id } });
      await ask(at, 'machines.setState', {
        params: { machineId: machine.id },
        version,
        body: { state: 'locked_out', words: 'Waits for a licensed electrician' },
      });
    }
  }
}
