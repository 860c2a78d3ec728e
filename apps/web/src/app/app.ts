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
  template: `
    <a class="skip tw-unseen" href="#main" (click)="skip($event)">Skip to the content</a>
    <router-outlet />
  `,
  styles: `
    .skip:focus {
      position: absolute;
      inset: 0.5rem auto auto 0.5rem;
      z-index: 10;
      padding: 0.5rem 1rem;
      background: var(--tw-carbon);
      color: var(--tw-on-carbon);
    }
  `,
})
export class App {
  constructor() {
    inject(Scheme);
    inject(Arrival).watch();
    this.#leadBackAfterEnd();
  }

  /** The address of the skip link would leave the page, because of the base element. */
  protected skip(event: Event): void {
    event.preventDefault();
    document.querySelector<HTMLElement>('main')?.focus();
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
