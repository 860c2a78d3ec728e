import { ChangeDetectionStrategy, Component, input, output } from '@angular/core';
import { MatButton } from '@angular/material/button';

/**
 * What just happened, in the page rather than over it, so that it can be read in one's own time:
 * "Statement 2031-04 for Foxglove Lane was mailed to 2 people." The region is always there, because
 * screen readers follow only changes inside a region they know.
 */
@Component({
  selector: 'tw-status',
  imports: [MatButton],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <div role="status">
      @if (message(); as text) {
        <div class="line">
          <p>{{ text }}</p>
          @if (action(); as label) {
            <button matButton type="button" (click)="acted.emit()">{{ label }}</button>
          }
          <button matButton type="button" (click)="dismissed.emit()">Close</button>
        </div>
      }
    </div>
  `,
  styles: `
    // In sight also for who has just pressed a button far down a long form.
    :host {
      position: sticky;
      z-index: 3;
      inset-block-start: 0.5rem;
      display: block;
    }
    .line {
      display: flex;
      flex-wrap: wrap;
      align-items: center;
      gap: 0 0.5rem;
      margin-block-end: 1rem;
      padding: 0.5rem 1rem;
      border: 1px solid var(--tw-carbon);
      border-radius: var(--tw-corner);
      background: var(--tw-sheet);
    }
    p {
      flex: 1 1 14rem;
      margin: 0;
    }
    @media print {
      :host {
        display: none;
      }
    }
  `,
})
export class StatusLine {
  readonly message = input<string | undefined>();
  /** What can be done about it, e.g. "Undo". */
  readonly action = input<string | undefined>();
  readonly acted = output<void>();
  readonly dismissed = output<void>();
}
