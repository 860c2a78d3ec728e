import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { Scheme, type SchemeChoice } from './scheme';

/** Light, dark, or as the system has it. */
@Component({
  selector: 'tw-scheme-toggle',
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <fieldset>
      <legend>Light or dark</legend>
      @for (option of options; track option.value) {
        <label>
          <input
            type="radio"
            name="tw-scheme"
            [value]="option.value"
            [checked]="scheme.choice() === option.value"
            (change)="scheme.choice.set(option.value)"
          />
          {{ option.label }}
        </label>
      }
    </fieldset>
  `,
  styles: `
    fieldset {
      display: flex;
      flex-wrap: wrap;
      gap: 0 1rem;
      margin: 0.5rem 0;
      padding: 0 0.75rem;
      border: 0;
    }
    legend {
      padding: 0;
      color: var(--tw-soft);
      font-size: 0.875rem;
    }
    label {
      display: inline-flex;
      align-items: center;
      gap: 0.375rem;
      min-block-size: 2.75rem;
    }
    input {
      inline-size: 1.125rem;
      block-size: 1.125rem;
      margin: 0;
      accent-color: var(--tw-carbon);
    }
  `,
})
export class SchemeToggle {
  protected readonly scheme = inject(Scheme);
  protected readonly options: readonly { value: SchemeChoice; label: string }[] = [
    { value: 'system', label: 'System' },
    { value: 'light', label: 'Light' },
    { value: 'dark', label: 'Dark' },
  ];
}
