import { inject, Injectable } from '@angular/core';
import { SwUpdate } from '@angular/service-worker';
import { filter } from 'rxjs';
import { Messages } from './messages';

/** Says when the application itself was renewed on the server; the person decides when to load it. */
@Injectable({ providedIn: 'root' })
export class NewVersion {
  readonly #updates = inject(SwUpdate);
  readonly #messages = inject(Messages);

  watch(): void {
    if (!this.#updates.isEnabled) return;
    this.#updates.versionUpdates
      .pipe(filter((event) => event.type === 'VERSION_READY'))
      .subscribe(() => this.#offer('A new version of Tumblewright is ready.'));
    this.#updates.unrecoverable.subscribe(() =>
      this.#offer('Tumblewright was renewed and has to be loaded again.'),
    );
  }

  #offer(text: string): void {
    this.#messages.say(text, { label: 'Load it', run: () => location.reload() });
  }
}
