import { computed, inject, Injectable, signal } from '@angular/core';
import { firstValueFrom } from 'rxjs';
import { v7 } from 'uuid';
import { StoresApi } from '../stores/stores-api';
import { MachinesApi, type NewMachine } from './machines-api';

export interface Several {
  readonly storeId: string;
  /** A bank that stands, or one to be added first. */
  readonly bank: string | { readonly letter: string; readonly words: string };
  readonly bays: readonly number[];
  readonly serials: ReadonlyMap<number, string>;
  readonly machine: Omit<NewMachine, 'bankId' | 'bayNumber' | 'serial'>;
}

/**
 * Adds machines one by one, each under a key of its own. When one is refused, those before it stand;
 * running it again goes on from there, and what was added is not added twice.
 */
@Injectable()
export class AddSeveral {
  readonly #stores = inject(StoresApi);
  readonly #machines = inject(MachinesApi);
  readonly #keys = new Map<string, string>();
  readonly #added = new Set<number>();
  #bankId: string | undefined;

  readonly busy = signal(false);
  readonly done = signal(0);
  readonly of = signal(0);
  /** What already stands, to be told beside what went wrong. */
  readonly standing = computed(() =>
    this.done()
      ? [`${this.done()} of ${this.of()} stand already; adding again goes on with the rest.`]
      : [],
  );

  async run(several: Several): Promise<number> {
    this.busy.set(true);
    this.of.set(several.bays.length);
    try {
      const bankId = await this.#bank(several);
      for (const bay of several.bays) await this.#add(bankId, bay, several);
      return this.#added.size;
    } finally {
      this.busy.set(false);
    }
  }

  async #bank({ storeId, bank }: Several): Promise<string> {
    if (typeof bank === 'string') return bank;
    this.#bankId ??= (
      await firstValueFrom(
        this.#stores.addBank(storeId, bank, this.#key(`bank ${bank.letter} ${bank.words}`)),
      )
    ).id;
    return this.#bankId;
  }

  async #add(bankId: string, bay: number, { machine, serials }: Several): Promise<void> {
    if (this.#added.has(bay)) return;
    const body = { ...machine, bankId, bayNumber: bay, serial: serials.get(bay) ?? '' };
    // Another body under the same key would be refused as another request.
    const key = this.#key(JSON.stringify(body));
    await firstValueFrom(this.#machines.create(body, key));
    this.#added.add(bay);
    this.done.set(this.#added.size);
  }

  #key(of: string): string {
    const key = this.#keys.get(of) ?? v7();
    this.#keys.set(of, key);
    return key;
  }
}
