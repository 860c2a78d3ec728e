import { type AnswerOf } from '@lib/contracts/web';
import { type Problem, problemFrom } from '../../core/api/problem';
import { type Act, type LocalAct } from './local-act';

export type ActResult = AnswerOf<'acts.record'>['results'][number];

/** Who carries acts and photos to the server; a failure ends with a `Problem`. */
export interface Courier {
  record(visitId: string, acts: Act[]): Promise<ActResult[]>;
  upload(photoId: string): Promise<void>;
}

/** Who keeps what became of them. */
interface Keeper {
  taken(ids: readonly string[]): Promise<void>;
  refused(ids: readonly string[], reason: string): Promise<void>;
}

const batch = 100;

/**
 * Sends the waiting acts of one visit in their order and keeps the answer for each. Photos go after
 * everything else, so that a weak signal carries words first, but before the end of the visit, after
 * which the server takes nothing more. Answers with what held it up, when it must be tried again.
 */
export async function deliverVisit(
  acts: readonly LocalAct[],
  courier: Courier,
  keeper: Keeper,
): Promise<Problem | undefined> {
  const end = acts.findIndex(({ act }) => act.kind === 'left' || act.kind === 'signed_off');
  const [work, closing] = end < 0 ? [acts, []] : [acts.slice(0, end), acts.slice(end)];
  const photos = acts.filter(({ act }) => act.kind === 'photo');
  try {
    for (const some of inBatches(work.filter(notPhoto))) await send(some, courier, keeper);
    for (const photo of photos) await sendPhoto(photo, courier, keeper);
    for (const some of inBatches(closing.filter(notPhoto))) await send(some, courier, keeper);
    return undefined;
  } catch (error) {
    return problemFrom(error);
  }
}

async function send(acts: readonly LocalAct[], courier: Courier, keeper: Keeper): Promise<void> {
  const first = acts[0];
  if (!first) return;
  try {
    const results = await courier.record(
      first.visitId,
      acts.map(({ act }) => act),
    );
    await keep(results, keeper);
  } catch (error) {
    const problem = problemFrom(error);
    if (triesAgain(problem)) throw problem;
    if (acts.length === 1 || isOfVisit(problem)) {
      await keeper.refused(
        acts.map(({ id }) => id),
        reasonOf(problem),
      );
      return;
    }
    // Something in it cannot be read at all: the rest must not suffer for it.
    const middle = Math.ceil(acts.length / 2);
    await send(acts.slice(0, middle), courier, keeper);
    await send(acts.slice(middle), courier, keeper);
  }
}

async function sendPhoto(photo: LocalAct, courier: Courier, keeper: Keeper): Promise<void> {
  if (photo.act.kind !== 'photo') return;
  try {
    await courier.upload(photo.act.payload.attachmentId);
  } catch (error) {
    const problem = problemFrom(error);
    if (triesAgain(problem)) throw problem;
    await keeper.refused([photo.id], reasonOf(problem));
    return;
  }
  await send([photo], courier, keeper);
}

async function keep(results: readonly ActResult[], keeper: Keeper): Promise<void> {
  const taken = results.filter(({ outcome }) => outcome !== 'refused').map(({ id }) => id);
  if (taken.length > 0) await keeper.taken(taken);
  for (const { id, outcome, reason } of results) {
    if (outcome === 'refused') await keeper.refused([id], reason ?? 'No reason was given.');
  }
}

/** Whether the same request can be taken later: nothing was answered, or not yet. */
function triesAgain(problem: Problem): boolean {
  return (
    problem.unanswered ||
    problem.status === 401 ||
    problem.status === 429 ||
    problem.kind === 'shop-paused'
  );
}

/** Refused whatever the acts say. */
function isOfVisit(problem: Problem): boolean {
  return problem.status === 403 || problem.status === 404;
}

function reasonOf(problem: Problem): string {
  if (problem.kind === 'not-found')
    return 'This visit is no longer yours, or is not there any more.';
  const details = problem.errors.map(({ detail }) => detail);
  return details.length > 0 ? `${problem.title}: ${details.join('; ')}.` : problem.message;
}

function notPhoto({ act }: LocalAct): boolean {
  return act.kind !== 'photo';
}

function inBatches(acts: readonly LocalAct[]): (readonly LocalAct[])[] {
  const batches: (readonly LocalAct[])[] = [];
  for (let at = 0; at < acts.length; at += batch) batches.push(acts.slice(at, at + batch));
  return batches;
}
