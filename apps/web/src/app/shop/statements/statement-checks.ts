import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import { type Statement } from './statements-api';

/** The figures proved again while they are shown, from the lines themselves. */
@Component({
  selector: 'tw-statement-checks',
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <details [open]="agree() < checks().length">
      <summary [class.alarm]="agree() < checks().length">
        {{ agree() }} of {{ checks().length }} checks of its figures agree
      </summary>
      <ul>
        @for (check of checks(); track check.words) {
          <li [class.alarm]="!check.holds">
            {{ check.words }}{{ check.holds ? '' : ': does not hold' }}
          </li>
        }
      </ul>
    </details>
  `,
  styles: `
    summary {
      padding-block: 0.25rem;
      cursor: pointer;
    }
    .alarm {
      color: var(--tw-alarm);
    }
  `,
})
export class StatementChecks {
  readonly checks = input.required<Statement['checks']>();

  protected readonly agree = computed(() => this.checks().filter(({ holds }) => holds).length);
}
