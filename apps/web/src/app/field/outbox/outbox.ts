import { computed, effect, inject, Injectable, signal, untracked } from '@angular/core';
import { v7 } from 'uuid';
import { Messages } from '../../core/messages/messages';
import { unsent } from '../../core/session/unsent';
import { FieldStore } from '../kept/field-store';
import { type KeptPhoto } from '../kept/kept';
import { type Act, type ActKind, inOrder, type LocalAct, type PayloadOf } from './local-act';

/** Sent acts are kept this long, to be counted and to stand over a day that is not asked for anew. */
const keptFor = 36 * 3_600_000;
const smallStep = 600_000;

/**
 * Everything recorded on this device for the membership the person works as. An act is shown at
 * once, kept in IndexedDB before anything is sent, and stays until the server has answered for it.
 */
@Injectable({ providedIn: 'root' })
export class Outbox {
  readonly #store = inject(FieldStore);
  readonly #messages = inject(Messages);
  readonly #acts = signal<readonly LocalAct[]>([]);
  readonly #otherTabs =
    typeof BroadcastChannel === 'undefined' ? undefined : new BroadcastChannel('tw.field');
  /** Grows when there is something new to send. */
  readonly added = signal(0);

  readonly acts = this.#acts.asReadonly();
  readonly waiting = computed(() => this.#acts().filter(({ state }) => state === 'waiting'));
  readonly refused = computed(() => this.#acts().filter(({ state }) => state === 'refused'));
  readonly sent = computed(() => this.#acts().filter(({ state }) => state === 'sent'));

  /** Whose acts are shown, once they are read. */
  #shownOf: string | undefined;
  #reading: Promise<void> | undefined;

  constructor() {
    effect(() => {
      // A device that keeps nothing says so when something is recorded.
      if (this.#store.membershipId()) untracked(() => this.#ready().catch(() => undefined));
      else this.#acts.set([]);
    });
    this.#otherTabs?.addEventListener('message', () => void this.load());
  }

  /** Waits until the acts of the membership are read, so that new ones come after them. */
  async #ready(): Promise<void> {
    while (this.#shownOf !== this.#store.membershipId()) {
      this.#reading ??= this.load().finally(() => (this.#reading = undefined));
      await this.#reading;
    }
  }

  /** Reads what the device keeps, and lets go of what was sent long ago. */
  async load(): Promise<void> {
    const membershipId = this.#store.membershipId();
    const database = await this.#store.database();
    const all = await database.all('acts');
    const oldest = new Date(Date.now() - keptFor).toISOString();
    const gone = all.filter(
      ({ answeredAt, state }) => state === 'sent' && (answeredAt ?? '') < oldest,
    );
    if (gone.length > 0)
      await database.remove(
        'acts',
        gone.map(({ id }) => id),
      );
    if (membershipId !== this.#store.membershipId()) return;
    const found = all.filter((act) => !gone.includes(act));
    if (this.#shownOf !== membershipId) this.#acts.set([]);
    this.#shownOf = membershipId;
    // Acts made while this was reading are newer than what was read.
    this.#acts.update((now) => {
      const known = new Set(found.map(({ id }) => id));
      return inOrder([
        ...found,
        ...now.filter(({ id, state }) => state === 'waiting' && !known.has(id)),
      ]);
    });
    this.#count();
    if (found.some(({ state }) => state === 'waiting')) this.added.update((n) => n + 1);
  }

  /** Records what happened. Resolves when the device keeps it; it may be sent much later. */
  async record<K extends ActKind>(visitId: string, kind: K, payload: PayloadOf<K>): Promise<void> {
    const id = v7();
    try {
      if (this.#shownOf !== this.#store.membershipId()) await this.#ready();
      const last = this.#acts().at(-1);
      const local: LocalAct = {
        id,
        order: Math.max(last?.order ?? 0, Date.now()) + 1,
        visitId,
        act: { id, kind, at: timeAfter(last?.act.at), payload } as unknown as Act,
        state: 'waiting',
        reason: '',
        answeredAt: null,
      };
      // Shown at once: the database may take a moment.
      this.#acts.update((acts) => [...acts, local]);
      await (await this.#store.database()).put('acts', [local]);
    } catch (error) {
      this.#acts.update((acts) => acts.filter((each) => each.id !== id));
      this.#messages.say(
        'This device could not keep your last entry: it has no room, or its settings forbid it. ' +
          'Make room and enter it again.',
      );
      throw error;
    }
    this.#changed();
    this.added.update((n) => n + 1);
  }

  async recordPhoto(photo: Omit<KeptPhoto, 'id' | 'uploaded'>): Promise<void> {
    const id = v7();
    const database = await this.#store.database();
    await database.put('photos', [{ ...photo, id, uploaded: false }]);
    await this.record(photo.visitId, 'photo', { jobId: photo.jobId, attachmentId: id });
  }

  async photo(id: string): Promise<KeptPhoto | undefined> {
    return (await this.#store.database()).get('photos', id);
  }

  async photoUploaded(photo: KeptPhoto): Promise<void> {
    await (await this.#store.database()).put('photos', [{ ...photo, uploaded: true }]);
  }

  /** The server has them. */
  async taken(ids: readonly string[]): Promise<void> {
    const answeredAt = new Date().toISOString();
    const changed = await this.#change(ids, (act) => ({ ...act, state: 'sent', answeredAt }));
    await this.#dropPhotos(changed);
  }

  /** The server does not take them: they wait for the person. */
  async refuse(ids: readonly string[], reason: string): Promise<void> {
    await this.#change(ids, (act) => ({ ...act, state: 'refused', reason }));
  }

  /** Sends refused acts once more. */
  async tryAgain(ids: readonly string[]): Promise<void> {
    await this.#change(ids, (act) => ({ ...act, state: 'waiting', reason: '' }));
    this.added.update((n) => n + 1);
  }

  /** The person lets refused acts go. */
  async discard(ids: readonly string[]): Promise<void> {
    const gone = this.#acts().filter(({ id, state }) => state === 'refused' && ids.includes(id));
    const database = await this.#store.database();
    await database.remove(
      'acts',
      gone.map(({ id }) => id),
    );
    await this.#dropPhotos(gone);
    this.#acts.update((acts) => acts.filter((act) => !gone.includes(act)));
    this.#changed();
  }

  async #change(ids: readonly string[], change: (act: LocalAct) => LocalAct): Promise<LocalAct[]> {
    const changed = this.#acts()
      .filter(({ id }) => ids.includes(id))
      .map(change);
    await (await this.#store.database()).put('acts', changed);
    const byId = new Map(changed.map((act) => [act.id, act]));
    this.#acts.update((acts) => acts.map((act) => byId.get(act.id) ?? act));
    this.#changed();
    return changed;
  }

  async #dropPhotos(acts: readonly LocalAct[]): Promise<void> {
    const photos = acts.flatMap(({ act }) =>
      act.kind === 'photo' ? [act.payload.attachmentId] : [],
    );
    if (photos.length > 0) await (await this.#store.database()).remove('photos', photos);
  }

  #changed(): void {
    this.#count();
    this.#otherTabs?.postMessage('changed');
  }

  #count(): void {
    const membershipId = this.#store.membershipId();
    const left = this.#acts().filter(({ state }) => state !== 'sent').length;
    if (membershipId) unsent.note(membershipId, left);
  }
}

/**
 * Now, but not before the act before it: a clock that is set back a little in the middle of a job
 * must not turn around what happened. A clock that was far ahead is not followed.
 */
function timeAfter(last: string | undefined): string {
  const now = Date.now();
  const before = last ? Date.parse(last) : 0;
  return new Date(before > now && before - now < smallStep ? before : now).toISOString();
}
