import { ChangeDetectionStrategy, Component, effect, inject } from '@angular/core';
import { Router, RouterOutlet } from '@angular/router';
import { Messages } from './core/messages/messages';
import { Arrival } from './core/navigation/arrival';
import { Scheme } from './core/scheme/scheme';
import { Session } from './core/session/session';

@Component({
  selector: 'tw-root',
  imports: [RouterOutlet],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `<router-outlet />`,
})
export class App {
  constructor() {
    inject(Scheme);
    inject(Arrival).watch();
    this.#skipToContent();
    this.#leadBackAfterEnd();
  }

  /** The skip link stands first in index.html; its address alone would leave the page. */
  #skipToContent(): void {
    document.querySelector('.tw-skip')?.addEventListener('click', (event) => {
      event.preventDefault();
      document.querySelector<HTMLElement>('main')?.focus();
    });
  }

  #leadBackAfterEnd(): void {
    const session = inject(Session);
    const router = inject(Router);
    const messages = inject(Messages);
    effect(() => {
      if (session.ended() === 0) return;
      messages.say('Your session has ended. Sign in to go on where you were.');
      void router.navigate(['/sign-in'], { queryParams: { next: router.url } });
    });
  }
}
