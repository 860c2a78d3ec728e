import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { RouterLink } from '@angular/router';
import { WordPipe } from '@lib/ui/words/words';
import { Session } from '../session/session';
import { PlainPage } from './plain-page';

@Component({
  selector: 'tw-no-entry',
  imports: [PlainPage, RouterLink, WordPipe],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <tw-plain-page heading="This page is not open to you">
      @if (role(); as name) {
        <p>You work as {{ name | twWord }}, and that role does not reach this page.</p>
        <p>
          <a routerLink="/">Go to your start page</a>
          @if (several()) {
            or <a routerLink="/memberships">go on as another of your memberships</a>
          }
        </p>
      } @else {
        <p>You are not signed in.</p>
        <p><a routerLink="/sign-in">Sign in</a></p>
      }
    </tw-plain-page>
  `,
})
export class NoEntry {
  readonly #session = inject(Session);
  protected readonly role = this.#session.role;
  protected readonly several = computed(() => this.#session.memberships().length > 1);
}
