import { ChangeDetectionStrategy, Component, input } from '@angular/core';

/** The head of a section of a page: its heading, a line of facts, and as content its actions. */
@Component({
  selector: 'tw-section-head',
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <div class="words">
      <h2>{{ heading() }}</h2>
      @if (sub(); as text) {
        <p>{{ text }}</p>
      }
    </div>
    <div class="actions"><ng-content /></div>
  `,
  styles: `
    :host {
      display: flex;
      flex-wrap: wrap;
      align-items: center;
      justify-content: space-between;
      gap: 0.5rem 1.5rem;
      min-block-size: 2.75rem;
      margin-block: 2rem 0.75rem;
    }
    h2 {
      margin: 0;
    }
    p {
      margin: 0;
      color: var(--tw-soft);
      font-size: 0.875rem;
    }
    .actions {
      display: flex;
      flex-wrap: wrap;
      gap: 0.5rem;
    }
    @media print {
      .actions {
        display: none;
      }
    }
  `,
})
export class SectionHead {
  readonly heading = input.required<string>();
  readonly sub = input<string | undefined>();
}
