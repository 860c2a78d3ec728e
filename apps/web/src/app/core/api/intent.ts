import { v7 } from 'uuid';

/**
 * One thing a person means to do, under one Idempotency-Key. Sending it again after no answer uses
 * the same key, so the server does it once; `renew` when what is meant changes.
 */
export class Intent {
  #key = v7();

  get key(): string {
    return this.#key;
  }

  renew(): void {
    this.#key = v7();
  }
}
