import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import { type MachineState } from '@lib/contracts/web';
import { StateMark, wordFor } from '@lib/ui';
import { type StoreSummary } from './stores-api';

/** How many machines of a store are in which state, told by the marks of the floor. */
@Component({
  selector: 'tw-machine-tally',
  imports: [StateMark],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    @for (part of parts(); track part.state) {
      <span [attr.data-state]="part.state">
        <tw-state-mark [state]="part.state" /> {{ part.count }} {{ part.word }}
      </span>
    } @empty {
      <span class="none">no machines yet</span>
    }
  `,
  styles: `
    :host {
      display: flex;
      flex-wrap: wrap;
      gap: 0.25rem 0.875rem;
      font-variant-numeric: tabular-nums;
    }
    span {
      white-space: nowrap;
    }
    .none {
      color: var(--tw-soft);
    }
    [data-state='down'] {
      color: var(--tw-alarm);
    }
    [data-state='degraded'] {
      color: var(--tw-ochre);
    }
  `,
})
export class MachineTally {
  readonly machines = input.required<StoreSummary['machines']>();

  protected readonly parts = computed(() => {
    const { up, degraded, down, lockedOut } = this.machines();
    const counts: [MachineState, number][] = [
      ['down', down],
      ['locked_out', lockedOut],
      ['degraded', degraded],
      ['up', up],
    ];
    return counts
      .filter(([, count]) => count > 0)
      .map(([state, count]) => ({ state, count, word: wordFor(state) }));
  });
}
