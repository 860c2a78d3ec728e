import { ChangeDetectionStrategy, Component, input, output } from '@angular/core';
import { MatFormField, MatLabel } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';
import { type Choice } from '../choices/choice-chips';

/** Narrows a list to one of many; '' is any. */
@Component({
  selector: 'tw-choice-filter',
  imports: [MatFormField, MatInput, MatLabel],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <mat-form-field subscriptSizing="dynamic">
      <mat-label>{{ label() }}</mat-label>
      <select matNativeControl (change)="choose($event)">
        <option value="" [selected]="value() === ''">{{ any() }}</option>
        @for (option of options(); track option.value) {
          <option [value]="option.value" [selected]="option.value === value()">
            {{ option.label }}
          </option>
        }
      </select>
    </mat-form-field>
  `,
  styles: `
    :host {
      flex: 2 1 8.5rem;
      // Its longest choice may be cut, so that two filters stand side by side on a phone.
      min-inline-size: 0;
      max-inline-size: 13rem;
    }
    mat-form-field {
      inline-size: 100%;
    }
  `,
})
export class ChoiceFilter {
  readonly label = input.required<string>();
  /** What '' is called: "Every store". */
  readonly any = input.required<string>();
  readonly options = input.required<readonly Choice[]>();
  readonly value = input.required<string>();
  readonly chosen = output<string>();

  protected choose(event: Event): void {
    this.chosen.emit((event.target as HTMLSelectElement).value);
  }
}
