import { ChangeDetectionStrategy, Component, input } from '@angular/core';
import { RouterLink } from '@angular/router';

/** The head of a page: where it belongs, its heading, a line of facts, and as content its actions. */
@Component({
  selector: 'tw-page-head',
  imports: [RouterLink],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    @if (upLink(); as link) {
      <a class="up" [routerLink]="link">{{ upLabel() }}</a>
    }
    <div class="row">
      <div class="words">
        <h1 tabindex="-1">{{ heading() }}</h1>
        @if (sub(); as text) {
          <p>{{ text }}</p>
        }
      </div>
      <div class="actions"><ng-content /></div>
    </div>
  `,
  styles: `
    :host {
      display: block;
      margin-block-end: 1.5rem;
    }
    .up {
      display: inline-flex;
      align-items: center;
      min-inline-size: var(--tw-touch);
      min-block-size: var(--tw-touch);
      font-size: 0.875rem;
    }
    .row {
      display: flex;
      flex-wrap: wrap;
      align-items: flex-start;
      justify-content: space-between;
      gap: 0.75rem 1.5rem;
    }
    .words {
      min-inline-size: 0;
      overflow-wrap: anywhere;
    }
    h1 {
      margin: 0;
    }
    p {
      margin: 0.25rem 0 0;
      color: var(--tw-soft);
    }
    .actions {
      display: flex;
      flex-wrap: wrap;
      gap: 0.5rem;
    }
    .actions:empty {
      display: none;
    }
    @media print {
      .up,
      .actions {
        display: none;
      }
    }
  `,
})
export class PageHead {
  readonly heading = input.required<string>();
  readonly sub = input<string | undefined>();
  /** The page this one belongs to. */
  readonly upLink = input<string | readonly unknown[] | undefined>();
  readonly upLabel = input('Back');
}
