import { ChangeDetectionStrategy, Component, input } from '@angular/core';
import { type Bearer } from '@lib/contracts/web';

/** Who bears a line. The shop's own lines stand out, since they are what the shop answers for. */
@Component({
  selector: 'tw-bearer',
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `{{ bearer() }}`,
  host: { '[class.tw-bearer--shop]': 'bearer() === "shop"' },
  styles: `
    :host {
      display: inline-block;
      justify-self: start;
      padding: 0.125rem 0.5rem;
      border: 1px solid var(--tw-hairline);
      border-radius: 0.25rem;
      font-size: 0.875em;
      color: var(--tw-ink);
      background: var(--tw-sheet);
    }
    :host(.tw-bearer--shop) {
      border-color: var(--tw-carbon);
      color: var(--tw-carbon);
      font-weight: 500;
    }
  `,
})
export class BearerLabel {
  readonly bearer = input.required<Bearer>();
}
