import { ChangeDetectionStrategy, Component, input } from '@angular/core';
import { DayPipe } from '@lib/ui';
import { type Contract } from './contracts-api';

/** The next rounds by the rule; one that falls on a closed day says where it went. */
@Component({
  selector: 'tw-next-rounds',
  imports: [DayPipe],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <ol>
      @for (round of rounds(); track round.dueOn) {
        <li class="tw-figures">
          {{ round.plannedOn | twDay }}
          @if (round.plannedOn !== round.dueOn) {
            <span class="tw-soft">instead of {{ round.dueOn | twDay }}, when we are closed</span>
          }
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
      padding-block: 0.125rem;
    }
  `,
})
export class NextRounds {
  readonly rounds = input.required<Contract['nextRounds']>();
}
