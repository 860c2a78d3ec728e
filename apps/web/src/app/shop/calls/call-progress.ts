import { ChangeDetectionStrategy, Component, input } from '@angular/core';
import { InstantPipe } from '@lib/ui';
import { type Call } from './calls-api';

/** How far a call has come: done steps full, those to come open. */
@Component({
  selector: 'tw-call-progress',
  imports: [InstantPipe],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <ol>
      @for (step of steps(); track step.step) {
        <li [class.come]="step.at">
          <span>{{ step.words }}</span>
          <span class="tw-soft tw-figures">{{ step.at ? (step.at | twInstant) : 'not yet' }}</span>
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
      display: grid;
      padding: 0 0 1rem 2rem;
    }
    li::before {
      content: '';
      position: absolute;
      inset: 0.3rem auto auto 0.25rem;
      inline-size: 0.75rem;
      block-size: 0.75rem;
      border: 2px solid var(--tw-soft);
      border-radius: 50%;
      background: var(--tw-paper);
      z-index: 1;
    }
    li:not(:last-child)::after {
      content: '';
      position: absolute;
      inset: 0.6rem auto -0.3rem 0.5625rem;
      border-inline-start: 2px dotted var(--tw-hairline);
    }
    .come::before {
      border-color: var(--tw-carbon);
      background: var(--tw-carbon);
    }
  `,
})
export class CallProgress {
  readonly steps = input.required<Call['progress']>();
}
