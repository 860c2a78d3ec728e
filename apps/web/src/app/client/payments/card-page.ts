import { DOCUMENT, inject, Injectable } from '@angular/core';

/** Leaves the application for the page of the card payment service. */
@Injectable({ providedIn: 'root' })
export class CardPage {
  readonly #document = inject(DOCUMENT);

  open(url: string): void {
    this.#document.location.assign(url);
  }
}
