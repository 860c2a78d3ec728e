import { inject, Injectable, signal } from '@angular/core';
import { NavigationStart, Router } from '@angular/router';
import { filter } from 'rxjs';

export interface Message {
  readonly text: string;
  readonly action?: { readonly label: string; run(): void };
}

/** A message said this shortly before leaving belongs to the page that is coming. */
const belongsToNext = 1_500;

/**
 * What just happened, said in the page: "Visit 0412 was cancelled." It stays until it is closed or
 * the person goes on, never for a time somebody else thought long enough.
 */
@Injectable({ providedIn: 'root' })
export class Messages {
  readonly #message = signal<Message | undefined>(undefined);
  #saidAt = 0;

  readonly message = this.#message.asReadonly();

  constructor() {
    inject(Router)
      .events.pipe(filter((event) => event instanceof NavigationStart))
      .subscribe(() => {
        if (Date.now() - this.#saidAt > belongsToNext) this.clear();
      });
  }

  say(text: string, action?: Message['action']): void {
    this.#saidAt = Date.now();
    this.#message.set(action ? { text, action } : { text });
  }

  act(): void {
    const message = this.#message();
    this.clear();
    message?.action?.run();
  }

  clear(): void {
    this.#message.set(undefined);
  }
}
