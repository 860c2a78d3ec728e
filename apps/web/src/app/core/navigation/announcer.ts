import { DOCUMENT, inject, Injectable } from '@angular/core';

/** Screen readers follow a change only of a region they have met; the same text twice is none. */
const pause = 100;

/**
 * Says something to screen readers without showing it. Material's announcer would bring along half
 * of its accessibility package before the first page is seen.
 */
@Injectable({ providedIn: 'root' })
export class Announcer {
  readonly #region = this.#addRegion(inject(DOCUMENT));

  announce(text: string): void {
    this.#region.textContent = '';
    setTimeout(() => (this.#region.textContent = text), pause);
  }

  #addRegion(document: Document): HTMLElement {
    const region = document.createElement('div');
    region.className = 'tw-unseen';
    region.setAttribute('aria-live', 'polite');
    region.setAttribute('aria-atomic', 'true');
    document.body.append(region);
    return region;
  }
}
