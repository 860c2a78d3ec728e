import { ChangeDetectionStrategy, Component, input, model } from '@angular/core';
import { MachineGlyph, WordPipe } from '@lib/ui';
import { type SheetJob } from '../kept/kept';
import { type LeftState } from './leaving';

/** How the machine is left, chosen by its own picture. */
@Component({
  selector: 'tw-left-as',
  imports: [MachineGlyph, WordPipe],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <fieldset [disabled]="closed()">
      <legend>Left as</legend>
      <div class="states">
        @for (state of states; track state) {
          <label [class.chosen]="left() === state">
            <input
              class="tw-unseen"
              type="radio"
              name="left-as"
              [value]="state"
              [checked]="left() === state"
              (change)="left.set(state)"
            />
            <tw-machine-glyph [kind]="machine().kind" [state]="state" [decorative]="true" />
            <span>{{ state | twWord }}</span>
          </label>
        }
      </div>
    </fieldset>
  `,
  styles: `
    fieldset {
      min-inline-size: 0;
      margin: 0;
      padding: 0;
      border: 0;
    }
    legend {
      padding: 0;
      margin-block-end: 0.375rem;
      font-weight: 500;
    }
    .states {
      display: grid;
      grid-template-columns: repeat(4, minmax(0, 1fr));
      gap: 0.5rem;
      --tw-glyph: 2.5rem;
    }
    label {
      display: grid;
      justify-items: center;
      gap: 0.25rem;
      padding: 0.5rem 0.125rem;
      border: 1px solid var(--tw-hairline);
      border-radius: var(--tw-corner);
      background: var(--tw-sheet);
      font-size: 0.875rem;
      text-align: center;
      cursor: pointer;
    }
    .chosen {
      border-color: var(--tw-carbon);
      box-shadow: inset 0 0 0 1px var(--tw-carbon);
      font-weight: 500;
    }
    label:has(:focus-visible) {
      outline: 3px solid var(--tw-carbon);
      outline-offset: 1px;
    }
  `,
})
export class LeftAs {
  readonly machine = input.required<SheetJob['machine']>();
  readonly closed = input(false);
  readonly left = model<LeftState | null>(null);
  protected readonly states: readonly LeftState[] = ['up', 'degraded', 'down', 'locked_out'];
}
