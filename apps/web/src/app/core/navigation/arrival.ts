import { afterNextRender, inject, Injectable, Injector } from '@angular/core';
import { Title } from '@angular/platform-browser';
import { NavigationEnd, Router } from '@angular/router';
import { filter, map, pairwise, startWith } from 'rxjs';
import { Announcer } from './announcer';

/**
 * A change of page inside the application looks like nothing to a screen reader and leaves the focus
 * on what is gone. So each arrival is announced by the page's title, and the focus goes to the head
 * of the new page.
 */
@Injectable({ providedIn: 'root' })
export class Arrival {
  readonly #router = inject(Router);
  readonly #announcer = inject(Announcer);
  readonly #title = inject(Title);
  readonly #injector = inject(Injector);

  watch(): void {
    this.#router.events
      .pipe(
        filter((event) => event instanceof NavigationEnd),
        map((event) => event.urlAfterRedirects.split(/[?#]/)[0] ?? ''),
        startWith(''),
        pairwise(),
        // The browser itself sees to the first page; filters in the address are the same page.
        filter(([from, to]) => from !== '' && from !== to),
      )
      .subscribe(() => afterNextRender(() => this.#greet(), { injector: this.#injector }));
  }

  #greet(): void {
    const main = document.querySelector<HTMLElement>('main');
    const head = main?.querySelector<HTMLElement>('h1[tabindex]') ?? main;
    // A page that put the focus into its own form knows better.
    if (main && !main.contains(document.activeElement)) head?.focus({ preventScroll: true });
    this.#announcer.announce(this.#title.getTitle());
  }
}
