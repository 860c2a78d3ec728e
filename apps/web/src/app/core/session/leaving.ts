import { Injectable } from '@angular/core';
import { unsent } from './unsent';

/** Something kept on this device that sign-out must ask about and remove. */
export interface LocalKeeping {
  /** What would be lost, in figures, or undefined: "4 acts have not been sent." */
  wouldLose(): Promise<string | undefined>;
  wipe(): Promise<void>;
}

/** What areas keep on the device. They say so here, and sign-out sees to it. */
@Injectable({ providedIn: 'root' })
export class LocalKeepings {
  readonly #all = new Set<LocalKeeping>();

  add(keeping: LocalKeeping): void {
    this.#all.add(keeping);
  }

  async losses(): Promise<string[]> {
    const losses = await Promise.all([...this.#all].map((keeping) => keeping.wouldLose()));
    return [...losses, unsentEntries()].filter((loss) => loss !== undefined);
  }

  async wipe(): Promise<void> {
    await Promise.all([...this.#all].map((keeping) => keeping.wipe()));
    unsent.forget();
    // Also what an area kept in an earlier visit and has not been opened in this one.
    const databases = (await globalThis.indexedDB?.databases?.()) ?? [];
    await Promise.all(
      databases
        .map(({ name }) => name ?? '')
        .filter((name) => name.startsWith('tw-'))
        .map(deleted),
    );
  }
}

function unsentEntries(): string | undefined {
  const count = unsent.count();
  if (count === 0) return undefined;
  return count === 1
    ? '1 entry on this device has not been sent and would be lost.'
    : `${count} entries on this device have not been sent and would be lost.`;
}

function deleted(name: string): Promise<void> {
  return new Promise((resolve) => {
    const request = indexedDB.deleteDatabase(name);
    request.onsuccess = request.onerror = request.onblocked = () => resolve();
  });
}
