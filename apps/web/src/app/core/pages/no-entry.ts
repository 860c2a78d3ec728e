import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { RouterLink } from '@angular/router';
import { wordFor } from '@lib/ui/words/words';
import { Session } from '../session/session';
import { PlainPage } from './plain-page';

@Component({
  selector: 'tw-no-entry',
  imports: [PlainPage, RouterLink],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <tw-plain-page heading="This page is not open to you">
      <p>You work as {{ role() }}, and that role does not reach this page.</p>
      <p>
        <a routerLink="/">Go to your start page</a>
        @if (several()) {
          or <a routerLink="/memberships">go on as another of your memberships</a>
        }
      </p>
    </tw-plain-page>
  `,
})
export class NoEntry {
  readonly #session = inject(Session);
  protected readonly role = computed(() => wordFor(this.#session.role() ?? 'nobody'));
  protected readonly several = computed(() => this.#session.memberships().length > 1);
}
