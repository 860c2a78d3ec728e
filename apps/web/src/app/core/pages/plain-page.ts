import { ChangeDetectionStrategy, Component, inject, input } from '@angular/core';
import { StatusLine } from '@lib/ui/notes/status-line';
import { Messages } from '../messages/messages';

/**
 * A page that stands alone, below the head that index.html brings: sign-in and its kin, and pages
 * that say why there is no other.
 */
@Component({
  selector: 'tw-plain-page',
  imports: [StatusLine],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <main id="main" tabindex="-1">
      <h1 tabindex="-1">{{ heading() }}</h1>
      <tw-status
        [message]="messages.message()?.text"
        [action]="messages.message()?.action?.label"
        (acted)="messages.act()"
        (dismissed)="messages.clear()"
      />
      <ng-content />
    </main>
  `,
  styles: `
    :host {
      display: block;
      padding-block-end: 2rem;
    }
    main {
      max-inline-size: min(26rem, calc(100% - 2rem));
      margin-inline: auto;
      padding: 1.5rem;
      border: 1px solid var(--tw-hairline);
      border-radius: var(--tw-corner);
      background: var(--tw-sheet);
    }
    main:focus {
      outline: none;
    }
    h1 {
      margin-block-end: 1rem;
    }
    @media (max-width: 30rem) {
      main {
        padding: 1rem;
      }
    }
  `,
})
export class PlainPage {
  readonly heading = input.required<string>();
  protected readonly messages = inject(Messages);
}
