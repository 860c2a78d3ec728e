import {
  booleanAttribute,
  ChangeDetectionStrategy,
  Component,
  computed,
  input,
} from '@angular/core';
import { type MachineKind, type MachineState } from '@lib/contracts/web';
import { labelFor, wordFor } from '../words/words';

/** Where in each drawing the state mark sits, and how large it is. */
const marks: Record<MachineKind, { y: number; r: number }> = {
  top_loader: { y: 38, r: 9 },
  front_loader: { y: 36, r: 9 },
  dryer: { y: 37, r: 7 },
  stacked_pair: { y: 43, r: 7 },
  extractor: { y: 31, r: 8 },
  changer: { y: 40, r: 8 },
  heater: { y: 34, r: 8 },
};

/**
 * Our own drawing of a machine. What it is shows in the outline; how it is shows in the mark, first
 * by shape (open ring up, half-filled degraded, filled with a bar down, padlock locked out, dashed
 * retired) and only then by colour.
 */
@Component({
  selector: 'tw-machine-glyph',
  templateUrl: './machine-glyph.html',
  changeDetection: ChangeDetectionStrategy.OnPush,
  host: { '[class]': '"tw-glyph-" + state()', '[attr.data-state]': 'state()' },
  styles: `
    :host {
      display: inline-block;
      inline-size: var(--tw-glyph, 3rem);
      line-height: 0;
      color: var(--tw-ink);
    }
    :host(.tw-glyph-degraded) {
      color: var(--tw-ochre);
    }
    :host(.tw-glyph-down) {
      color: var(--tw-alarm);
    }
    :host(.tw-glyph-retired) {
      color: var(--tw-soft);
    }
    svg {
      inline-size: 100%;
      block-size: auto;
      overflow: visible;
    }
    .line {
      fill: none;
      stroke: currentColor;
      stroke-width: 2;
      stroke-linejoin: round;
      stroke-linecap: round;
    }
    :host(.tw-glyph-retired) .line,
    :host(.tw-glyph-retired) .mark {
      stroke-dasharray: 3 3;
      stroke-linecap: butt;
    }
    .mark {
      fill: none;
      stroke: currentColor;
      stroke-width: 3;
    }
    .full {
      fill: currentColor;
    }
    .bar {
      stroke: var(--tw-sheet);
      stroke-width: 3;
    }
  `,
})
export class MachineGlyph {
  readonly kind = input.required<MachineKind>();
  readonly state = input.required<MachineState>();
  /** Say `decorative` where words beside the drawing tell kind and state already. */
  readonly decorative = input(false, { transform: booleanAttribute });

  protected readonly mark = computed(() => marks[this.kind()]);
  protected readonly text = computed(() => `${labelFor(this.kind())}, ${wordFor(this.state())}`);
  /** The padlock is drawn around its own middle, and made to fit the door it hangs on. */
  protected readonly padlockPlace = computed(() => {
    const { y, r } = this.mark();
    return `translate(24 ${y}) scale(${r / 9})`;
  });
  protected readonly lowerHalf = computed(() => {
    const { y, r } = this.mark();
    return `M${24 - r} ${y} A${r} ${r} 0 0 0 ${24 + r} ${y} Z`;
  });
}
