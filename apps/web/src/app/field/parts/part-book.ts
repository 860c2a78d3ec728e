import { inject, Injectable, signal } from '@angular/core';
import { firstValueFrom } from 'rxjs';
import { Api } from '../../core/api/api';
import { FieldStore } from '../kept/field-store';
import { type KeptPart } from '../kept/kept';
import { findParts } from './find-parts';

/** More parts than this are searched on the server only: the phone has other things to keep. */
const mostKept = 3_000;
const mostFound = 12;
const pageSize = 100;
const freshFor = 6 * 3_600_000;

/** The parts of the price book, also without a signal. */
@Injectable({ providedIn: 'root' })
export class PartBook {
  readonly #api = inject(Api);
  readonly #store = inject(FieldStore);
  readonly #kept = signal<readonly KeptPart[]>([]);
  #filledAt = 0;
  #of: string | undefined;

  readonly kept = this.#kept.asReadonly();

  /** Takes the book along for later; failing is no matter, it is tried again with the next day. */
  async takeAlong(): Promise<void> {
    const membershipId = this.#store.membershipId();
    if (this.#of !== membershipId) {
      this.#kept.set([]);
      this.#filledAt = 0;
      this.#of = membershipId;
    }
    if (Date.now() - this.#filledAt < freshFor) return;
    try {
      const database = await this.#store.database();
      if (this.#kept().length === 0) this.#kept.set(await database.all('parts'));
      const parts = await this.#all();
      if (membershipId !== this.#store.membershipId()) return;
      await database.replace('parts', parts);
      this.#kept.set(parts);
      this.#filledAt = Date.now();
    } catch {
      return;
    }
  }

  /** What the server finds, or without an answer what was taken along. */
  async find(words: string): Promise<readonly KeptPart[]> {
    try {
      const { items } = await firstValueFrom(
        this.#api.call('parts.list', { query: { q: words, limit: mostFound } }),
      );
      return items.map(keptOf);
    } catch {
      return findParts(this.#kept(), words, mostFound);
    }
  }

  async #all(): Promise<KeptPart[]> {
    const parts: KeptPart[] = [];
    let cursor: string | null | undefined;
    do {
      const page = await firstValueFrom(
        this.#api.call('parts.list', {
          query: { limit: pageSize, ...(cursor ? { cursor } : {}) },
        }),
      );
      parts.push(...page.items.map(keptOf));
      cursor = page.next;
    } while (cursor && parts.length < mostKept);
    return parts;
  }
}

function keptOf(part: KeptPart): KeptPart {
  const { id, number, name, category, scarce, successor } = part;
  return {
    id,
    number,
    name,
    category,
    scarce,
    successor: successor && { id: successor.id, number: successor.number },
  };
}
