import { computed, inject, Injectable } from '@angular/core';
import { type LocalKeeping, LocalKeepings } from '../../core/session/leaving';
import { Session } from '../../core/session/session';
import { KeptDatabase } from './database';

/**
 * The database of the membership the person works as. Each membership has its own, because what was
 * recorded for one shop must never be sent to another.
 */
@Injectable({ providedIn: 'root' })
export class FieldStore implements LocalKeeping {
  readonly #session = inject(Session);
  readonly #open = new Map<string, Promise<KeptDatabase>>();

  readonly membershipId = computed(() => this.#session.membership()?.id);

  constructor() {
    inject(LocalKeepings).add(this);
  }

  async database(membershipId = this.membershipId()): Promise<KeptDatabase> {
    if (!membershipId) throw new Error('Nobody is signed in');
    const name = `tw-field-${membershipId}`;
    const database = await (this.#open.get(name) ?? this.#opened(name));
    return database.closed ? this.#opened(name) : database;
  }

  #opened(name: string): Promise<KeptDatabase> {
    const opening = KeptDatabase.open(name);
    // A failure must not stand for ever: the next use tries again.
    opening.catch(() => this.#open.delete(name));
    this.#open.set(name, opening);
    return opening;
  }

  /** What is unsent is counted beside the session: it must be known without this area. */
  wouldLose(): Promise<undefined> {
    return Promise.resolve(undefined);
  }

  /** Sign-out then deletes the databases, those of other memberships too. */
  async wipe(): Promise<void> {
    for (const opening of this.#open.values()) (await opening.catch(() => undefined))?.close();
    this.#open.clear();
  }
}
