import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import { InstantPipe } from '@lib/ui/format/time-pipes';
import { type Call } from './calls-api';
import { stepsToShow } from './steps-to-show';

/** How far a call has come, and what is still to come. */
@Component({
  selector: 'tw-call-progress',
  imports: [InstantPipe],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <ol>
      @for (step of steps(); track step.step) {
        <li [class.done]="step.at" [attr.aria-current]="step.latest ? 'step' : null">
          <span class="mark" aria-hidden="true"></span>
          <div>
            {{ step.words }}
            @if (step.at) {
              <span class="tw-soft">{{ step.at | twInstant }}</span>
            } @else {
              <span class="tw-soft">not yet</span>
            }
          </div>
        </li>
      }
    </ol>
  `,
  styles: `
    ol {
      margin: 0;
      padding: 0;
      list-style: none;
    }
    li {
      position: relative;
      display: flex;
      gap: 0.75rem;
      padding-block-end: 1rem;
      color: var(--tw-soft);
    }
    li.done {
      color: var(--tw-ink);
    }
    li:not(:last-child)::before {
      content: '';
      position: absolute;
      inset: 1.25rem auto 0 0.4375rem;
      border-inline-start: 2px dotted var(--tw-hairline);
    }
    li.done:has(+ .done)::before {
      border-inline-start: 2px solid var(--tw-carbon);
    }
    .mark {
      flex: none;
      inline-size: 1rem;
      block-size: 1rem;
      margin-block-start: 0.25rem;
      border: 2px solid var(--tw-field-line);
      border-radius: 50%;
      background: var(--tw-sheet);
    }
    .done .mark {
      border-color: var(--tw-carbon);
      background: var(--tw-carbon);
    }
    div span {
      display: block;
      font-size: 0.875rem;
    }
    [aria-current] {
      font-weight: 500;
    }
    [aria-current] span {
      font-weight: 400;
    }
  `,
})
export class CallProgress {
  readonly progress = input.required<Call['progress']>();

  protected readonly steps = computed(() => stepsToShow(this.progress()));
}
