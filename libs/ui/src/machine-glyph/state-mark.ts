import { ChangeDetectionStrategy, Component, input } from '@angular/core';
import { type MachineState } from '@lib/contracts/web';

/** The mark of a machine's state alone, to stand before its word in a line or a table. */
@Component({
  selector: 'tw-state-mark',
  changeDetection: ChangeDetectionStrategy.OnPush,
  host: { 'aria-hidden': 'true', '[attr.data-state]': 'state()' },
  template: `
    <svg viewBox="0 0 20 20">
      @switch (state()) {
        @case ('up') {
          <circle class="ring" cx="10" cy="10" r="7" />
        }
        @case ('degraded') {
          <circle class="ring" cx="10" cy="10" r="7" />
          <path class="full" d="M3 10 A7 7 0 0 0 17 10 Z" />
        }
        @case ('down') {
          <circle class="full" cx="10" cy="10" r="8.5" />
          <path class="bar" d="M5.5 10 H14.5" />
        }
        @case ('locked_out') {
          <rect class="full" x="3.5" y="9" width="13" height="9" rx="1.5" />
          <path class="ring" d="M6.5 9 V6 A3.5 3.5 0 0 1 13.5 6 V9" />
        }
        @case ('retired') {
          <circle class="ring dashed" cx="10" cy="10" r="7" />
        }
      }
    </svg>
  `,
  styles: `
    :host {
      display: inline-block;
      inline-size: 1em;
      block-size: 1em;
      vertical-align: -0.125em;
      color: var(--tw-ink);
    }
    :host([data-state='degraded']) {
      color: var(--tw-ochre);
    }
    :host([data-state='down']) {
      color: var(--tw-alarm);
    }
    :host([data-state='retired']) {
      color: var(--tw-soft);
    }
    svg {
      display: block;
    }
    .ring {
      fill: none;
      stroke: currentColor;
      stroke-width: 2.5;
    }
    .dashed {
      stroke-dasharray: 3 3;
    }
    .full {
      fill: currentColor;
    }
    .bar {
      stroke: var(--tw-sheet);
      stroke-width: 2.5;
    }
  `,
})
export class StateMark {
  readonly state = input.required<MachineState>();
}
