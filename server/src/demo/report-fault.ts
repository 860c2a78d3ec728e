import { type DateTime } from 'luxon';
import { ask } from './ask';
import { type JobStory } from './day-story';
import { type DemoShop, type DemoStore } from './set-up';

/** With these a machine earns nothing; with any other it still does, more or less. */
const stopping: ReadonlySet<string> = new Set([
  'wont_start',
  'wont_fill',
  'wont_drain',
  'wont_heat',
  'wont_spin',
  'wont_lock',
  'leaks',
  'takes_no_payment',
]);

interface Report {
  at: DateTime;
  by: 'attendant' | 'office';
  /** Nobody has been there by today, so the machine stands as reported on the floor one sees. */
  stands: boolean;
}

/** A fault is reported; answers the call's id. */
export async function reportFault(
  shop: DemoShop,
  store: DemoStore,
  story: JobStory,
  { at, by, stands }: Report,
): Promise<string> {
  const caller = by === 'attendant' ? store.attendant : shop.office;
  const symptom = story.fault?.symptom ?? 'other';
  const call = await ask(caller.at(at.toJSDate()), 'calls.report', {
    body: {
      storeId: store.id,
      machineId: story.machine.id,
      symptom,
      words: story.words,
      ...(by === 'attendant' ? {} : { reportedBy: store.plan.attendant }),
    },
  });
  if (!stands) return call.id;
  const office = shop.office.at(at.plus({ minutes: 10 }).toJSDate());
  const machine = { machineId: story.machine.id };
  const { version } = await ask(office, 'machines.show', { params: machine });
  await ask(office, 'machines.setState', {
    params: machine,
    version,
    body: { state: stopping.has(symptom) ? 'down' : 'degraded', words: `Call ${call.number}` },
  });
  return call.id;
}
