import { Injectable, signal } from '@angular/core';

/**
 * How the person reads numbers and times: the language, currency and zone of the shop they work
 * with. The session sets it; parts of the library read it, so that no template repeats it.
 */
@Injectable({ providedIn: 'root' })
export class Reading {
  readonly locale = signal('en-US');
  readonly currency = signal('USD');
  readonly zone = signal('UTC');
}
