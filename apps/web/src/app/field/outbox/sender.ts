import { effect, inject, Injectable, signal, untracked } from '@angular/core';
import { firstValueFrom } from 'rxjs';
import { Api } from '../../core/api/api';
import { isProblem, Problem } from '../../core/api/problem';
import { oneAtATime } from '../../core/session/one-at-a-time';
import { FieldStore } from '../kept/field-store';
import { type Courier, deliverVisit } from './delivery';
import { type LocalAct } from './local-act';
import { Outbox } from './outbox';

/** Acts made in one go are sent in one go. */
const gathering = 400;
const firstPause = 2_000;
const longestPause = 300_000;

/**
 * Sends what waits in the outbox whenever there is hope of an answer: when something is recorded,
 * when the device comes back on line or into view, and else after pauses that grow.
 */
@Injectable({ providedIn: 'root' })
export class Sender {
  readonly #api = inject(Api);
  readonly #outbox = inject(Outbox);
  readonly #store = inject(FieldStore);
  #timer: ReturnType<typeof setTimeout> | undefined;
  #pause = firstPause;
  #running = false;
  #again = false;

  /** What holds sending up; undefined while all is well. */
  readonly heldUpBy = signal<Problem | undefined>(undefined);
  /** Since when the server has not answered. */
  readonly quietSince = signal<string | undefined>(undefined);

  constructor() {
    effect(() => {
      if (this.#outbox.added() > 0) untracked(() => this.#wake(gathering));
    });
    addEventListener('online', () => this.sendNow());
    document.addEventListener('visibilitychange', () => {
      if (document.visibilityState === 'visible') this.sendNow();
    });
  }

  sendNow(): void {
    this.#pause = firstPause;
    this.#wake(0);
  }

  #wake(after: number): void {
    clearTimeout(this.#timer);
    this.#timer = setTimeout(() => void this.#run(), after);
  }

  async #run(): Promise<void> {
    this.#again = true;
    if (this.#running) return;
    this.#running = true;
    try {
      while (this.#again) {
        this.#again = false;
        await this.#sendAll();
      }
    } catch {
      // The device did not give out what it keeps; nothing is lost by asking it again.
      this.#wake(this.#pause);
    } finally {
      this.#running = false;
    }
  }

  async #sendAll(): Promise<void> {
    const membershipId = this.#store.membershipId();
    if (!membershipId || this.#outbox.waiting().length === 0) return;
    const problem = await oneAtATime(`tw.field.${membershipId}`, async () => {
      // Another tab may have sent meanwhile what waited here.
      await this.#outbox.load();
      return this.#sendVisits(membershipId);
    });
    this.heldUpBy.set(problem);
    if (!problem) {
      this.#pause = firstPause;
      this.quietSince.set(undefined);
    } else {
      if (problem.unanswered) this.quietSince.update((since) => since ?? new Date().toISOString());
      this.#wake(this.#pause * (0.75 + Math.random() / 2));
      this.#pause = Math.min(this.#pause * 2, longestPause);
    }
  }

  async #sendVisits(membershipId: string): Promise<Problem | undefined> {
    const visits = new Map<string, LocalAct[]>();
    for (const act of this.#outbox.waiting()) {
      visits.set(act.visitId, [...(visits.get(act.visitId) ?? []), act]);
    }
    let heldUp: Problem | undefined;
    for (const acts of visits.values()) {
      const problem = await deliverVisit(acts, this.#courier(membershipId), {
        taken: (ids) => this.#outbox.taken(ids),
        refused: (ids, reason) => this.#outbox.refuse(ids, reason),
      });
      heldUp ??= problem;
      // Without an answer for one visit there will be none for the next; a refusal is its own.
      if (isProblem(problem, 'no-answer')) break;
    }
    return heldUp;
  }

  #courier(membershipId: string): Courier {
    return {
      record: async (visitId, acts) => {
        const answer = await this.#as(membershipId, () =>
          firstValueFrom(this.#api.call('acts.record', { params: { visitId }, body: { acts } })),
        );
        return answer.results;
      },
      upload: (photoId) => this.#as(membershipId, () => this.#upload(photoId)),
    };
  }

  /** Nothing recorded as one membership may be judged by what another one may do. */
  async #as<T>(membershipId: string, work: () => Promise<T>): Promise<T> {
    const stop = () => new Problem('no-answer', 0, 'The person goes on as another membership.');
    if (this.#store.membershipId() !== membershipId) throw stop();
    try {
      return await work();
    } catch (error) {
      throw this.#store.membershipId() === membershipId ? error : stop();
    }
  }

  async #upload(photoId: string): Promise<void> {
    const photo = await this.#outbox.photo(photoId);
    // Uploaded before its act was answered for, and dropped then by another tab.
    if (!photo || photo.uploaded) return;
    const upload = new FormData();
    upload.set('id', photo.id);
    upload.set('ownerKind', 'job');
    upload.set('ownerId', photo.jobId);
    upload.set('file', photo.content, photo.name);
    await firstValueFrom(
      this.#api.call('files.add', {
        body: { id: photo.id, ownerKind: 'job', ownerId: photo.jobId },
        upload,
      }),
    );
    await this.#outbox.photoUploaded(photo);
  }
}
