import { v7 as uuid } from 'uuid';
import { type BodyOf } from '@lib/contracts/web';
import { cautionsFor } from '@lib/domain';
import { ask } from './ask';
import { type JobStory, type PastJob } from './day-story';
import { type Person } from './people';
import { type Random } from './random';
import { type DemoShop } from './set-up';

type Act = BodyOf<'acts.record'>['acts'][number];
type Say = <K extends Act['kind']>(kind: K, payload: Extract<Act, { kind: K }>['payload']) => void;

/** A tech goes through a visit, act by act, as the phone would send them. */
export async function playVisit(
  shop: DemoShop,
  tech: Person,
  visitId: string,
  stories: readonly JobStory[],
  calls: ReadonlyMap<string, string>,
  arrival: Date,
  random: Random,
  finished: readonly string[] = [],
): Promise<PastJob[]> {
  const acts: Act[] = [];
  let clock = arrival.getTime();
  const say: Say = (kind, payload) => {
    clock += 30_000 + random.below(90) * 1000;
    acts.push({ id: uuid(), kind, at: new Date(clock).toISOString(), payload } as Act);
  };
  const done: PastJob[] = [];
  say('arrived', {});
  for (const story of stories) {
    const jobId = uuid();
    sayJob(shop, say, jobId, story, calls.get(story.machine.id) ?? null, random);
    clock += story.minutes * 60_000;
    if (story.fault?.part) {
      done.push({ jobId, machineId: story.machine.id, fault: story.fault, day: arrival });
    }
  }
  for (const openItemId of finished) say('open_item_done', { openItemId });
  say('left', {});
  say('signed_off', { receivedBy: random.chance(0.6) ? 'the attendant' : null });
  const { results } = await ask(tech.at(new Date(clock + 60_000)), 'acts.record', {
    params: { visitId },
    body: { acts },
  });
  const refused = results.find((result) => result.outcome === 'refused');
  if (refused) {
    const act = acts.find((a) => a.id === refused.id);
    throw new Error(`The demo's ${act?.kind} was refused: ${refused.reason}`);
  }
  return done;
}

function sayJob(
  shop: DemoShop,
  say: Say,
  jobId: string,
  story: JobStory,
  callId: string | null,
  random: Random,
): void {
  const { machine, fault } = story;
  say('job_opened', { jobId, machineId: machine.id, callId, symptom: fault?.symptom ?? 'other' });
  if (!fault) {
    say('nothing_found', { jobId, minutes: story.minutes, cycles: 1, coins: 8, amount: 200 });
    return;
  }
  const cautions = cautionsFor(machine.kind, machine.energy).map((caution) => caution.code);
  say('cautions_ticked', { jobId, cautions });
  say('finding', { jobId, code: fault.code, category: fault.category, words: fault.found });
  say('cause', { jobId, cause: story.cause });
  say('action', {
    jobId,
    words: story.left === 'unfinished' ? 'Part to be ordered' : fault.action,
  });
  if (fault.part && story.left !== 'unfinished') {
    say('part_used', {
      jobId,
      partUseId: uuid(),
      partId: shop.parts.get(fault.part) as string,
      quantityMilli: 1000,
      source: random.chance(0.08) ? 'storeroom' : 'van',
    });
  }
  const access = random.chance(0.2) ? 20 : 0;
  say('minutes', { jobId, minutes: story.minutes, afterHoursMinutes: 0, accessMinutes: access });
  if (story.mark !== 'none') {
    say('warranty_marked', {
      jobId,
      mark: story.mark,
      words: story.markWords,
      causedByJobId: story.causedByJobId,
    });
  }
  if (story.left === 'put_right') say('test_cycle', { jobId, cycles: 1, coins: 8, amount: 200 });
  if (story.left !== 'put_right') {
    say('handed_over', {
      openItemId: uuid(),
      machineId: machine.id,
      words:
        story.left === 'unfinished'
          ? 'Fit the part that is on order'
          : 'Made safe: see that its lead was renewed, then test it',
    });
  }
  say('job_done', {
    jobId,
    result: story.left,
    machineState:
      story.left === 'put_right' ? 'up' : story.left === 'unfinished' ? 'degraded' : 'locked_out',
  });
}
