import { type KeptDay, type KeptPart, type KeptPhoto, type KeptSheet } from './kept';
import { type LocalAct } from '../outbox/local-act';

/** What stands in each store of the database, and under which key. */
interface Schema {
  acts: LocalAct;
  photos: KeptPhoto;
  sheets: KeptSheet;
  days: KeptDay;
  parts: KeptPart;
}
type StoreName = keyof Schema;

const keys: Record<StoreName, string> = {
  acts: 'id',
  photos: 'id',
  sheets: 'visitId',
  days: 'on',
  parts: 'id',
};
const version = 1;

/** IndexedDB with promises and types; one transaction a call, so that a call is kept whole or not. */
export class KeptDatabase {
  #closed = false;

  private constructor(private readonly database: IDBDatabase) {
    // Sign-out in another tab deletes the database; an open connection would hold that up.
    database.onversionchange = () => this.close();
    database.onclose = () => (this.#closed = true);
  }

  get closed(): boolean {
    return this.#closed;
  }

  static async open(name: string): Promise<KeptDatabase> {
    const request = indexedDB.open(name, version);
    request.onupgradeneeded = () => {
      for (const [store, keyPath] of Object.entries(keys)) {
        request.result.createObjectStore(store, { keyPath });
      }
    };
    return new KeptDatabase(await answered(request));
  }

  get<S extends StoreName>(store: S, key: string): Promise<Schema[S] | undefined> {
    return answered<Schema[S] | undefined>(this.#reading(store).get(key));
  }

  all<S extends StoreName>(store: S): Promise<Schema[S][]> {
    return answered<Schema[S][]>(this.#reading(store).getAll());
  }

  count(store: StoreName): Promise<number> {
    return answered(this.#reading(store).count());
  }

  async put<S extends StoreName>(store: S, values: readonly Schema[S][]): Promise<void> {
    await this.#write(store, (objects) => values.forEach((value) => objects.put(value)));
  }

  async remove(store: StoreName, ids: readonly string[]): Promise<void> {
    await this.#write(store, (objects) => ids.forEach((id) => objects.delete(id)));
  }

  /** In place of everything that was in the store. */
  async replace<S extends StoreName>(store: S, values: readonly Schema[S][]): Promise<void> {
    await this.#write(store, (objects) => {
      objects.clear();
      values.forEach((value) => objects.put(value));
    });
  }

  close(): void {
    this.#closed = true;
    this.database.close();
  }

  #reading(store: StoreName): IDBObjectStore {
    return this.database.transaction(store, 'readonly').objectStore(store);
  }

  #write(store: StoreName, work: (objects: IDBObjectStore) => void): Promise<void> {
    return new Promise((resolve, reject) => {
      const transaction = this.database.transaction(store, 'readwrite');
      transaction.oncomplete = () => resolve();
      transaction.onabort = transaction.onerror = () =>
        reject(transaction.error ?? new Error('The device did not keep it'));
      work(transaction.objectStore(store));
    });
  }
}

function answered<T>(request: IDBRequest<T>): Promise<T> {
  return new Promise((resolve, reject) => {
    request.onsuccess = () => resolve(request.result);
    request.onerror = () => reject(request.error ?? new Error('The device did not answer'));
  });
}
