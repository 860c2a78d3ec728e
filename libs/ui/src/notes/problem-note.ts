import {
  booleanAttribute,
  ChangeDetectionStrategy,
  Component,
  computed,
  input,
  output,
} from '@angular/core';
import { MatButton } from '@angular/material/button';
import { problemText } from './problem-text';

/** Something did not load: what happened, and the way to try again. */
@Component({
  selector: 'tw-problem',
  imports: [MatButton],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <div class="note" role="alert">
      <p>{{ text() }}</p>
      @if (retriable()) {
        <button matButton="outlined" type="button" (click)="retry.emit()">Try again</button>
      }
    </div>
  `,
  styles: `
    .note {
      display: flex;
      flex-wrap: wrap;
      align-items: center;
      gap: 0.75rem;
      padding: 0.75rem 1rem;
      margin-block: 1rem;
      border-inline-start: 4px solid var(--tw-alarm);
      background: var(--tw-alarm-wash);
      color: var(--tw-ink);
    }
    p {
      flex: 1 1 16rem;
      margin: 0;
    }
  `,
})
export class ProblemNote {
  readonly problem = input.required<unknown>();
  /** False where trying again cannot help. */
  readonly retriable = input(true, { transform: booleanAttribute });
  readonly retry = output<void>();

  protected readonly text = computed(() => problemText(this.problem()));
}
