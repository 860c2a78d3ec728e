import { ChangeDetectionStrategy, Component, input } from '@angular/core';

/** Nothing here yet: what will appear, and as content the one action that makes it appear. */
@Component({
  selector: 'tw-empty',
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <p>{{ text() }}</p>
    <ng-content />
  `,
  styles: `
    :host {
      display: grid;
      justify-items: start;
      gap: 0.75rem;
      padding: 1.5rem;
      border: 1px dashed var(--tw-hairline);
      border-radius: var(--tw-corner);
      color: var(--tw-soft);
    }
    p {
      margin: 0;
      max-inline-size: 36rem;
    }
  `,
})
export class EmptyNote {
  readonly text = input.required<string>();
}
